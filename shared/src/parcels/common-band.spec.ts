import { bandConflict, commonBand } from './common-band';

const species = (commonName: string, bandLowF: number, bandHighF: number) => ({
  commonName,
  bandLowF,
  bandHighF,
});

// Expected values by hand: the highest low and the lowest high.
describe('commonBand', () => {
  it('is the band of the only species', () => {
    expect(commonBand([species('corn snake', 60, 86)])).toEqual({
      ok: true,
      lowF: 60,
      highF: 86,
      warmest: 'corn snake',
      coolest: 'corn snake',
    });
  });

  it('is the part that all bands share', () => {
    const kinds = [species('corn snake', 60, 86), species('crested gecko', 58, 80), species('boa', 65, 88)];
    expect(commonBand(kinds)).toMatchObject({ ok: true, lowF: 65, highF: 80 });
  });

  it('names the two that do not go together', () => {
    const kinds = [
      species('corn snake', 60, 86),
      species('hellbender', 40, 60),
      species('uromastyx', 80, 105),
    ];
    expect(commonBand(kinds)).toMatchObject({ ok: false, warmest: 'uromastyx', coolest: 'hellbender' });
    expect(bandConflict(kinds)).toBe(
      'Uromastyx and hellbender do not go into one box: no temperature suits both.',
    );
    expect(bandConflict(kinds.slice(0, 1))).toBeNull();
  });

  it('finds none where the bands only touch', () => {
    expect(commonBand([species('a', 60, 70), species('b', 70, 80)])).toMatchObject({
      ok: false,
      warmest: 'b',
      coolest: 'a',
    });
  });

  it('is null for an empty box', () => {
    expect(commonBand([])).toBeNull();
  });
});

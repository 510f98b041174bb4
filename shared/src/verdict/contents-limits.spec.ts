import { AppError } from '../errors';
import { assertCommonBand, contentsLimits, type ContentsLine, type SpeciesLimits } from './contents-limits';
import { cornSnake } from './question-samples';

const line = (changes: Partial<SpeciesLimits>): ContentsLine => ({
  species: { ...cornSnake, ...changes },
  quantity: 1,
  massG: 100,
});
const gecko = line({
  commonName: 'crested gecko',
  bandLowF: 62,
  bandHighF: 80,
  enduranceLowF: 52,
  enduranceHighF: 84,
  outdoorLowF: 45,
});
const hellbender = line({ commonName: 'hellbender', bandLowF: 40, bandHighF: 60 });

describe('what several species in one box can take', () => {
  it('is what suits all of them: the highest low and the lowest high of each limit', () => {
    const dragon = line({
      commonName: 'bearded dragon',
      bandLowF: 65,
      bandHighF: 95,
      enduranceLowF: 50,
      enduranceHighF: 105,
      outdoorLowF: 40,
      outdoorHighF: 95,
    });
    expect(contentsLimits([line({}), gecko, dragon])).toEqual({
      bandLowF: 65,
      bandHighF: 80,
      enduranceLowF: 52,
      enduranceHighF: 84,
      outdoorLowF: 45,
      outdoorHighF: 95,
    });
  });

  it('sets no outdoor limit where no species has one', () => {
    expect(contentsLimits([line({})])).toMatchObject({ outdoorLowF: null, outdoorHighF: null });
  });

  it('is nothing when one needs it warmer than another endures: an error that names the two', () => {
    const refuse = (): unknown => {
      try {
        return assertCommonBand([line({}), hellbender, gecko]);
      } catch (error) {
        return error;
      }
    };
    const error = refuse();
    expect(error).toBeInstanceOf(AppError);
    expect((error as AppError).errors).toEqual([
      {
        path: 'contents',
        message: 'Crested gecko and hellbender do not go into one box: no temperature suits both.',
      },
    ]);
    expect(assertCommonBand([line({}), gecko])).toMatchObject({ bandLowF: 62, bandHighF: 80 });
  });

  it('cannot be said of an empty box', () => {
    expect(() => contentsLimits([])).toThrow(RangeError);
  });
});

import { couldJoin, runActions, runsFor, sharesOf, toldOnConfirmation } from './run-actions';
import { sampleParcel, sampleRun } from './run-samples';

describe('what can be done with a run', () => {
  it('follows its state, the next thing first', () => {
    const of = (state: 'proposed' | 'confirmed' | 'underway' | 'handed-over') =>
      runActions(sampleRun({ state }), ['coordinator'], '2026-12-08')[0];
    expect([of('proposed'), of('confirmed'), of('underway'), of('handed-over')]).toEqual([
      'confirm',
      'depart',
      'hand-over',
      undefined,
    ]);
  });

  it('is looking only for a breeder', () => {
    expect(runActions(sampleRun({ state: 'confirmed' }), ['breeder'], '2026-12-08')).toEqual([]);
  });

  it('does not let the driver leave before the day', () => {
    expect(runActions(sampleRun({ state: 'confirmed' }), ['coordinator'], '2026-12-07')).not.toContain(
      'depart',
    );
  });
});

describe('joining a run', () => {
  const run = sampleRun({ date: '2026-12-08' });
  const ids = (parcels: Parameters<typeof couldJoin>[0]) => couldJoin(parcels, run).map(({ id }) => id);

  it('is for parcels booked on its day, or left open over it', () => {
    expect(
      ids([
        sampleParcel({ id: 901, flexible: { from: '2026-12-07', to: '2026-12-09' } }),
        sampleParcel({ id: 902, flexible: { from: '2026-12-09', to: '2026-12-11' } }),
        sampleParcel({ id: 903, state: 'booked', flexible: null, shipDate: '2026-12-08' }),
        sampleParcel({ id: 904, state: 'booked', flexible: null, shipDate: '2026-12-09' }),
        sampleParcel({ id: 905, state: 'on-hold' }),
      ]),
    ).toEqual([901, 903]);
  });

  it('is not for a parcel on a confirmed run', () => {
    const on = (state: string) => ({ id: 7, state, date: '2026-12-08', coordinatorName: 'Delia' });
    expect(
      ids([sampleParcel({ id: 906, run: on('confirmed') }), sampleParcel({ id: 907, run: on('proposed') })]),
    ).toEqual([907]);
  });
});

describe('the runs that could take a parcel', () => {
  it('are still to be driven, on an open day, and not the one it is on', () => {
    const parcel = sampleParcel({
      flexible: { from: '2026-12-07', to: '2026-12-09' },
      run: { id: 3, state: 'proposed', date: '2026-12-08', coordinatorName: 'Delia' },
    });
    const runs = [
      sampleRun({ id: 1, date: '2026-12-08' }),
      sampleRun({ id: 2, date: '2026-12-09', state: 'confirmed' }),
      sampleRun({ id: 3, date: '2026-12-08' }),
      sampleRun({ id: 4, date: '2026-12-10' }),
      sampleRun({ id: 5, date: '2026-12-08', state: 'underway' }),
      sampleRun({ id: 6, date: '2026-12-07' }),
    ];
    expect(runsFor(parcel, runs, '2026-12-08').map(({ id }) => id)).toEqual([1, 2]);
  });
});

describe('the shares', () => {
  it('stand beside what driving alone would cost', () => {
    expect(sharesOf(sampleRun())[0]?.aloneCents).toBe(3200);
    expect(sharesOf(sampleRun({ stops: [] }))[0]?.aloneCents).toBeNull();
  });

  it('are added up by breeder and come to the cost of the run', () => {
    const run = sampleRun();
    const shares = sharesOf(run);
    expect(shares.reduce((sum, share) => sum + share.cents, 0)).toBe(
      run.parcels.reduce((sum, parcel) => sum + parcel.shareCents, 0),
    );
    expect(new Set(shares.map((share) => share.breederId)).size).toBe(shares.length);
  });
});

it('says whom a confirmation tells', () => {
  expect(toldOnConfirmation(sampleRun())).toMatch(/breeders? and the buyers of \d+ parcels? get a mail/);
});

import { boardColumns, boardSummary, boardWeeks } from './board-layout';
import { sampleParcel, sampleRun } from './run-samples';

// By a printed calendar, 8 December 2026 is a Tuesday.
const today = '2026-12-08';
const weeks = (count: number) => ({ start: '2026-12-06', count });
const datesOf = (weeks: ReturnType<typeof boardWeeks>) =>
  weeks.map((week) => week.days.map((day) => day.date.slice(8)).join(' '));

describe('the run board', () => {
  it('leaves past days and weekends out when nothing goes then', () => {
    expect(datesOf(boardWeeks([], [], today, weeks(2)))).toEqual(['08 09 10 11', '14 15 16 17 18']);
  });

  it('keeps a past day and a Saturday on which a run goes', () => {
    const runs = [
      sampleRun({ date: '2026-12-07', state: 'handed-over' }),
      sampleRun({ id: 2, date: '2026-12-12' }),
    ];
    const board = boardWeeks(runs, [], today, weeks(1));
    expect(datesOf(board)).toEqual(['07 08 09 10 11 12']);
    expect(board[0]?.days[0]?.isPast).toBe(true);
  });

  it('names the weeks', () => {
    expect(boardWeeks([], [], today, weeks(3)).map((week) => week.title)).toEqual([
      'This week',
      'Next week',
      'Week of December 21',
    ]);
  });

  it('drops runs that were called off and sorts a day by departure', () => {
    const late = sampleRun({ id: 1, departAt: '2026-12-08T19:00:00.000Z' });
    const early = sampleRun({ id: 2, departAt: '2026-12-08T17:00:00.000Z' });
    const off = sampleRun({ id: 3, state: 'called-off' });
    expect(
      boardWeeks([late, early, off], [], today, weeks(1))[0]?.days[0]?.runs.map((run) => run.id),
    ).toEqual([2, 1]);
  });

  it('says in words what an empty day means', () => {
    const booked = sampleParcel({ state: 'booked', shipDate: '2026-12-09', flexible: null });
    const open = sampleParcel({ id: 202 });
    const days = boardWeeks([], [booked, open], today, weeks(1))[0]?.days ?? [];
    expect(days.map((day) => day.emptyText)).toEqual([
      'No run. 1 parcel could go if the weather allows and someone drives.',
      'No run yet. 1 parcel is booked for this day.',
      'No run. 1 parcel could go if the weather allows and someone drives.',
      'No run needed.',
    ]);
  });

  it('gives days with runs the wider columns', () => {
    const week = boardWeeks([sampleRun()], [], today, weeks(1))[0];
    expect(week && boardColumns(week).split(') ')[0]).toBe('minmax(164px, 2fr');
  });

  it('names the run that waits for a word', () => {
    const board = boardWeeks(
      [sampleRun(), sampleRun({ id: 2, date: '2026-12-10', state: 'confirmed' })],
      [],
      today,
      weeks(1),
    );
    expect(boardSummary(board, () => 'Tuesday')).toBe(
      '4 parcels are placed on 2 runs. The run on Tuesday waits for your word.',
    );
    expect(boardSummary([], () => '')).toBe('No run is planned yet.');
  });
});

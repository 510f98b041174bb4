import type { BlackoutPreview } from '@shared/contract';
import { movesText, yesText } from './moves-text';

const parcel = (id: number): BlackoutPreview['parcels'][number] => ({
  id,
  code: `HC-000${id}`,
  what: 'corn snake',
  breederName: 'A',
  buyerName: 'B',
  shipDate: '2026-12-08',
  text: '',
});
const run = { id: 1, date: '2026-12-08', coordinatorName: 'C', parcels: 4 };
const nothing: BlackoutPreview = { days: [], parcels: [], runs: [], people: [] };

describe('what saving a blackout would move', () => {
  it('says when nothing moves', () => {
    const preview = { ...nothing, days: ['2026-12-08'] };
    expect(movesText(preview, false)).toBe('1 day closed. Nothing that is booked moves.');
    expect(yesText(preview, false)).toBe('Save');
  });
  it('counts parcels and runs, in the singular too', () => {
    const days = ['2026-12-08', '2026-12-09'];
    expect(movesText({ ...nothing, days, parcels: [parcel(1)], runs: [run] }, false)).toBe(
      '2 days closed. 1 parcel loses its day, 1 run changes.',
    );
    const two = { ...nothing, days, parcels: [parcel(1), parcel(2)] };
    expect(movesText(two, false)).toBe('2 days closed. 2 parcels lose their day.');
    expect(yesText(two, false)).toBe('Save and put 2 parcels on hold');
  });
  it('says that parcels on hold are not booked again by a removal', () => {
    expect(movesText(nothing, true)).toContain('stay so until somebody books them');
    expect(yesText(nothing, true)).toBe('Remove');
  });
});

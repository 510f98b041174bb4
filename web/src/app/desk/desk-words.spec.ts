import type { Desk } from '@shared/contract';
import { matterCount, matterText, quietText } from './desk-words';

const calm: Desk = {
  forecasts: [],
  failedMail: [],
  mailWaiting: 3,
  runs: [],
  parcels: [],
  counts: { people: 9, parcels: 4, runs: 1 },
};
const parcel = { id: 1, code: 'HC-0001', text: 'On hold.' };

describe('the desk in words', () => {
  it('is calm when nothing needs anybody; mail that only waits is no matter', () => {
    expect(matterCount(calm)).toBe(0);
    expect(matterText(calm)).toBe('Nothing waits for you.');
  });
  it('counts every matter', () => {
    const busy = {
      ...calm,
      parcels: [parcel, parcel],
      forecasts: [{ place: 'Boise', issuedAt: null, fetchedAt: null, problem: 'x' }],
    };
    expect(matterText(busy)).toBe('3 matters need somebody.');
    expect(matterText({ ...calm, parcels: [parcel] })).toBe('One matter needs somebody.');
  });
  it('says what is as it should be', () => {
    expect(quietText({ ...calm, parcels: [parcel] })).toBe('Mail, runs and forecasts are as they should be.');
    const run = { id: 1, date: '2026-12-08', text: '' };
    const forecast = { place: 'Boise', issuedAt: null, fetchedAt: null, problem: 'x' };
    const onlyMail = { ...calm, parcels: [parcel], runs: [run], forecasts: [forecast] };
    expect(quietText(onlyMail)).toBe('Mail is as it should be.');
    const mail = { id: 1, to: 'a@example.org', subject: '', error: '', at: '2026-12-01T00:00:00.000Z' };
    expect(quietText({ ...onlyMail, failedMail: [mail] })).toBe('');
  });
});

import { answersFromQuery, answersToQuery, type RouteAnswers } from './route-answers';

const read = (query: Record<string, string>) => (key: string) => query[key] ?? null;
const full: RouteAnswers = {
  service: 'hold',
  counterId: 22,
  postalCode: '86001',
  contents: [
    { speciesId: 3, quantity: 1, massG: 160 },
    { speciesId: 5, quantity: 2, massG: 35.5 },
  ],
  boxId: 1,
  dropOffCounterId: 2,
  date: '2026-12-08',
};

describe('answers carried in an address', () => {
  it('are written plainly', () => {
    expect(answersToQuery(full)).toEqual({
      service: 'hold',
      counter: '22',
      zip: '86001',
      contents: '3x1x160,5x2x35.5',
      box: '1',
      from: '2',
      day: '2026-12-08',
    });
  });

  it('come back as they went', () => {
    expect(answersFromQuery(read(answersToQuery(full)))).toEqual(full);
  });

  it('leave out what was not answered', () => {
    const bare = {
      ...full,
      counterId: null,
      postalCode: null,
      contents: [],
      boxId: null,
      dropOffCounterId: null,
      date: null,
    };
    expect(answersToQuery(bare)).toEqual({ service: 'hold' });
    expect(answersFromQuery(read({}))).toEqual(bare);
  });

  it.each([
    ['counter', 'DROP TABLE'],
    ['counter', '-4'],
    ['zip', '8600'],
    ['contents', '3x1'],
    ['contents', '0x1x160'],
    ['contents', '3x1xheavy'],
    ['day', 'tomorrow'],
  ])('do not believe %s=%s', (key, value) => {
    const bare = answersFromQuery(read({}));
    expect(answersFromQuery(read({ [key]: value }))).toEqual(bare);
  });
});

import { createTestSite, type TestSite } from '../support/test-site';

describe('GET /breeders', () => {
  let site: TestSite;
  beforeAll(async () => {
    site = await createTestSite();
  });
  afterAll(() => site.close());

  it.each([
    [null, 401],
    ['buyer@example.org', 403],
    ['breeder@example.org', 403],
    ['coordinator@example.org', 200],
    ['admin@example.org', 200],
  ])('answers %s with %d: only who enters parcels for others may look', async (who, status) => {
    await (await site.as(who)).get('/api/breeders').expect(status);
  });

  it('names every breeder with the counter where theirs are dropped off, and nobody else', async () => {
    const { body } = await (await site.as('coordinator@example.org')).get('/api/breeders').expect(200);
    const counter = { dropOffCounterId: site.ids.dropOffCounter };
    expect(body).toHaveLength(2);
    expect(body).toEqual(
      expect.arrayContaining([
        { id: site.ids.breeder, name: 'Bea Breeder', businessName: 'Third Draw Serpents', ...counter },
        { id: site.ids.otherBreeder, name: 'Otto Other', businessName: 'Cypress Fork Geckos', ...counter },
      ]),
    );
  });

  it('leaves out a breeder whose account is shut', async () => {
    await site.db('people').where({ id: site.ids.otherBreeder }).update({ active: false });
    const { body } = await (await site.as('admin@example.org')).get('/api/breeders').expect(200);
    expect(body).toEqual([expect.objectContaining({ id: site.ids.breeder })]);
  });
});

import { createTestSite, type TestSite } from '../support/test-site';

describe('GET/POST/DELETE /api/session', () => {
  let site: TestSite;
  beforeAll(async () => {
    site = await createTestSite();
  });
  afterAll(() => site.close());

  it('says that nobody is signed in', async () => {
    const answer = await (await site.as(null)).get('/api/session').expect(200);
    expect(answer.body).toMatchObject({ me: null, demo: false });
  });

  it('signs in, knows who it is, and signs out', async () => {
    const breeder = await site.as('breeder@example.org');
    expect((await breeder.get('/api/session')).body).toMatchObject({
      me: { name: 'Bea Breeder', roles: ['breeder'] },
    });
    await breeder.delete('/api/session').expect(204);
    expect((await breeder.get('/api/session')).body).toMatchObject({ me: null });
  });

  it('refuses a wrong password with the words it has for an unknown address', async () => {
    const guest = await site.as(null);
    const wrong = await guest
      .post('/api/session')
      .send({ email: 'breeder@example.org', password: 'not this one' });
    const unknown = await guest
      .post('/api/session')
      .send({ email: 'nobody@example.org', password: 'not this one' });
    expect(wrong.status).toBe(401);
    expect(unknown.status).toBe(401);
    expect(unknown.body.detail).toBe(wrong.body.detail);
  });

  it('answers field by field, and 403, 400, 413, 415 for a missing token, broken JSON, a huge body, another type', async () => {
    const guest = await site.as(null);
    const empty = await guest.post('/api/session').send({}).expect(400);
    expect(empty.type).toBe('application/problem+json');
    expect(empty.body.errors.map((e: { path: string }) => e.path).sort()).toEqual(['email', 'password']);
    await guest.post('/api/session').set('X-XSRF-TOKEN', 'x').send({}).expect(403);
    await guest.post('/api/session').set('Content-Type', 'application/json').send('{').expect(400);
    await guest
      .post('/api/session')
      .send({ email: 'x'.repeat(300_000) })
      .expect(413);
    await guest.post('/api/session').type('text').send('hello').expect(415);
  });
});

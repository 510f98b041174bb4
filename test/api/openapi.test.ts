import { execFileSync } from 'node:child_process';
import { createTestSite, type TestSite } from '../support/test-site';

/**
 * Held against the OpenAPI Initiative's own JSON Schema of version 3.1, as shipped by
 * `@seriousme/openapi-schema-validator` (an ES module, so it runs in a process of its own).
 */
function validate(document: unknown): { valid: boolean; errors?: unknown } {
  const script = `
    import { Validator } from '@seriousme/openapi-schema-validator';
    import { readFileSync } from 'node:fs';
    const result = await new Validator().validate(JSON.parse(readFileSync(0, 'utf8')));
    process.stdout.write(JSON.stringify(result));`;
  const output = execFileSync(process.execPath, ['--input-type=module', '-e', script], {
    input: JSON.stringify(document),
  });
  return JSON.parse(output.toString()) as { valid: boolean; errors?: unknown };
}

describe('GET /api/openapi.json', () => {
  let site: TestSite;
  beforeAll(async () => {
    site = await createTestSite();
  });
  afterAll(() => site.close());

  it('is a valid OpenAPI 3.1 document', async () => {
    const { body } = await (await site.as(null)).get('/api/openapi.json').expect(200);
    expect(validate(body)).toEqual({ valid: true });
  });

  it('would be found out if it were not', () => {
    expect(validate({ openapi: '3.1.0', info: { title: 'no version' }, paths: {} }).valid).toBe(false);
  });

  it.each([
    ['/api/session', ['get', 'post', 'delete']],
    ['/api/route-checks', ['post']],
    ['/api/parcels', ['get', 'post']],
    ['/api/parcels/{id}', ['get', 'patch']],
    ['/api/parcels/{id}/days', ['get']],
    ['/api/parcels/{id}/booking', ['put', 'delete']],
    ['/api/runs/proposals', ['post']],
    ['/api/runs', ['get']],
    ['/api/runs/{id}', ['get', 'patch']],
    ['/api/runs/{id}/confirmation', ['post']],
    ['/api/runs/{id}/departure', ['post']],
    ['/api/runs/{id}/hand-over', ['post']],
    ['/api/runs/{id}/call-off', ['post']],
    ['/api/blackouts', ['get', 'post']],
    ['/api/blackouts/{id}', ['patch', 'delete']],
    ['/api/blackouts/preview', ['post']],
    ['/api/arrivals/{token}', ['get']],
    ['/api/arrivals/{token}/mornings', ['put']],
    ['/api/arrivals/{token}/report', ['post']],
    ['/api/species', ['get']],
    ['/api/boxes', ['get']],
    ['/api/counters', ['get']],
    ['/api/health', ['get']],
  ])('describes %s', async (path, methods) => {
    const { body } = await (await site.as(null)).get('/api/openapi.json');
    expect(Object.keys(body.paths[path] ?? {})).toEqual(expect.arrayContaining(methods));
  });
});

import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, signIn, signOut, test } from './support/site';

/** WCAG 2.2 level A and AA, as axe-core tells them apart. */
const wcag = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const looks = [
  { width: 1440, height: 900, colorScheme: 'light' },
  { width: 1440, height: 900, colorScheme: 'dark' },
  { width: 390, height: 844, colorScheme: 'light' },
  { width: 390, height: 844, colorScheme: 'dark' },
] as const;

interface Listed {
  readonly id: number;
  readonly state: string;
  readonly arrivalUrl?: string;
}

const list = async (page: Page, path: string): Promise<Listed[]> => {
  const answer = await page.request.get(path);
  expect(answer.ok(), `${path} answers ${answer.status()}`).toBe(true);
  return (await answer.json()) as Listed[];
};

/** Addresses of every page that a role has, with a parcel and a run in every state. */
const pagesOf: Record<string, (page: Page) => Promise<string[]>> = {
  nobody: () =>
    Promise.resolve([
      '/sign-in',
      '/forgot-password',
      '/demo',
      '/account-link/no-such-link-at-all-here',
      '/nowhere',
    ]),
  'breeder@example.org': async (page) => {
    const parcels = await list(page, '/api/parcels');
    const runs = await list(page, '/api/runs');
    return [
      '/parcels',
      '/parcels/new',
      ...oneOfEach(parcels).map(({ id }) => `/parcels/${id}`),
      `/parcels/${parcels.find(({ state }) => state === 'draft')?.id}/edit`,
      '/route-check',
      '/runs',
      `/runs/${runs[0]?.id}`,
      '/blackouts',
      '/policy',
      '/how',
      '/account',
    ];
  },
  'coordinator@example.org': async (page) => [
    '/runs',
    '/runs/new',
    ...oneOfEach(await list(page, '/api/runs')).map(({ id }) => `/runs/${id}`),
    '/parcels',
    ...oneOfEach(await list(page, '/api/parcels')).map(({ id }) => `/parcels/${id}`),
    '/counters',
    '/species',
    '/boxes',
    '/policy',
    '/account',
  ],
  'buyer@example.org': async (page) => {
    const arrivals = (await (await page.request.get('/api/arrivals')).json()) as { token: string }[];
    return ['/my-arrivals', ...arrivals.map(({ token }) => `/arrival/${token}`), '/how', '/account'];
  },
  'admin@example.org': async (page) => [
    '/desk',
    '/blackouts',
    '/counters',
    `/counters/${(await list(page, '/api/counters'))[0]?.id}`,
    '/counters/new',
    '/species',
    '/species/new',
    '/boxes',
    '/boxes/new',
    '/policy',
    '/people',
    '/people/new',
    `/people/${(await list(page, '/api/people'))[0]?.id}`,
    '/account',
  ],
};

const oneOfEach = (rows: readonly Listed[]): Listed[] => [
  ...new Map(rows.map((row) => [row.state, row])).values(),
];

for (const [who, addresses] of Object.entries(pagesOf))
  test(`${who}: no page has anything against WCAG 2.2 AA, at both widths, light and dark`, async ({
    page,
  }) => {
    test.setTimeout(240_000);
    await signOut(page);
    if (who !== 'nobody') await signIn(page, who);
    for (const address of await addresses(page)) await checkPage(page, address);
  });

async function checkPage(page: Page, address: string): Promise<void> {
  await page.goto(address);
  await page.waitForLoadState('networkidle');
  for (const { width, height, colorScheme } of looks) {
    await page.setViewportSize({ width, height });
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
    const where = `${address} at ${width} px, ${colorScheme}`;
    await expect(page.getByRole('heading', { level: 1 }), where).toHaveCount(1);
    expect(await page.title(), where).toMatch(/ · Dayberth$/);
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(overflow, `${where} is wider than the window`).toBeLessThanOrEqual(0);
    const { violations } = await new AxeBuilder({ page }).withTags(wcag).analyze();
    const said = violations.map(
      ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`,
    );
    expect(said, where).toEqual([]);
  }
}

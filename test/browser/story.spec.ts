import ICAL from 'ical.js';
import type { Page } from '@playwright/test';
import { expect, signIn, signOut, test } from './support/site';

/**
 * One parcel through every hand, each step in a real browser on a phone or a desk: a breeder books it, a coordinator pools and
 * confirms it, the buyer reads when to come, and an admin's blackout takes it off its day. The mails are read as they arrive.
 */
test.describe.configure({ mode: 'serial' });

const buyer = { name: 'Ines Calder', email: 'ines@example.org' };
const phone = { width: 390, height: 844 };
const desk = { width: 1440, height: 900 };
let code = '';
let arrivalPath = '';

const pick = async (page: Page, label: string, option: RegExp) => {
  await page.getByRole('combobox', { name: label }).click();
  await page.getByRole('option', { name: option }).click();
};
const eventIn = (calendar: string | null) => {
  const component = new ICAL.Component(ICAL.parse(calendar ?? '') as unknown[]);
  const event = component.getFirstSubcomponent('vevent');
  if (!event) throw new Error('The calendar part has no event.');
  return { method: String(component.getFirstPropertyValue('method')), event: new ICAL.Event(event) };
};

test('a breeder on a phone enters a parcel, sees its days and books Wednesday', async ({ page, site }) => {
  await page.setViewportSize(phone);
  await signIn(page, 'breeder@example.org');
  await expect(page).toHaveURL(/\/parcels$/);
  await page.getByRole('link', { name: 'New parcel' }).first().click();

  // Saved too early it says what is missing, at its field.
  await page.getByRole('button', { name: 'Save the parcel' }).click();
  await expect(page.getByText('Fill this in.').first()).toBeVisible();

  await page.getByRole('group', { name: 'Kind 1' }).getByRole('combobox', { name: 'Species' }).click();
  await page.getByRole('option', { name: /leopard gecko/ }).click();
  await page.getByLabel('Name', { exact: true }).fill(buyer.name);
  await page.getByLabel('E-mail').fill(buyer.email);
  await page.getByLabel("Buyer's ZIP code").fill('77002');
  await expect(page.getByText(/Houston counter/).first()).toBeVisible();
  await page.getByLabel('Ready from').fill('2026-12-01');
  await page.getByLabel('Latest ship day').fill('2026-12-11');
  await page.getByRole('button', { name: 'Save the parcel' }).click();
  await expect(page).toHaveURL(/\/parcels\/\d+$/);

  const days = page.getByRole('radiogroup', { name: 'Ship day' });
  await expect(days.getByRole('radio')).toHaveCount(14);
  await days.getByRole('radio', { name: /December 5/ }).click();
  await expect(page.getByText(/takes no drop-off on Saturday, December 5/)).toBeVisible();
  await expect(page.getByRole('button', { name: 'Sat, Dec 5 is shut' })).toBeDisabled();
  await days.getByRole('radio', { name: /December 2/ }).click();
  await page.getByRole('button', { name: 'Book Wed, Dec 2' }).click();
  await expect(page.getByText('booked', { exact: true }).first()).toBeVisible();
  code = /HC-\d{4}/.exec(await page.locator('main').innerText())?.[0] ?? '';
  expect(code).toMatch(/^HC-\d{4}$/);

  const mail = await site.mailbox.find(buyer.email, /./);
  const link = new RegExp(`${site.url}(/arrival/[\\w-]+)`).exec(mail.text);
  arrivalPath = link?.[1] ?? '';
  expect(arrivalPath).not.toBe('');
});

test('a coordinator has runs proposed, opens the one with the parcel and confirms it; everybody is invited', async ({
  page,
  site,
}) => {
  await page.setViewportSize(desk);
  await signIn(page, 'coordinator@example.org');
  await expect(page).toHaveURL(/\/runs$/);
  await page.getByRole('button', { name: 'Propose runs' }).click();
  await expect(page.getByText('Proposed just now.')).toBeVisible({ timeout: 60_000 });
  const runs = (await (await page.request.get('/api/runs?state=proposed')).json()) as {
    id: number;
    parcels: { code: string }[];
  }[];
  const run = runs.find(({ parcels }) => parcels.some((parcel) => parcel.code === code));
  expect(run, `a proposed run takes ${code}`).toBeDefined();
  await page.goto(`/runs/${run?.id}`);
  await expect(page.getByRole('heading', { level: 1 })).toContainText('Wednesday, December 2');
  await expect(page.getByRole('link', { name: new RegExp(code) }).first()).toBeVisible();
  await page.getByRole('button', { name: 'Confirm the run' }).click();
  await expect(page.getByRole('dialog')).toContainText('get a mail with a calendar invitation');
  await page.getByRole('button', { name: 'Confirm and tell everybody' }).click();
  await expect(page.getByText('confirmed', { exact: true }).first()).toBeVisible();

  for (const email of [buyer.email, 'breeder@example.org', 'marco@example.org']) {
    const invitation = async () =>
      (await site.mailbox.to(email)).find((mail) => /DTSTART[^\n]*2026120[23]T/.test(mail.calendar ?? ''));
    await expect.poll(invitation, { timeout: 20_000 }).toBeDefined();
    const mail = await invitation();
    const { method, event } = eventIn(mail?.calendar ?? null);
    expect(method).toBe('REQUEST');
    expect(event.attendees.map((one) => String(one.getFirstValue()).toLowerCase())).toEqual([
      `mailto:${email}`,
    ]);
  }
  const [toBuyer] = (await site.mailbox.to(buyer.email)).filter((mail) => mail.calendar !== null);
  const { event } = eventIn(toBuyer?.calendar ?? null);
  // Ready at 9:00 in Houston on Thursday, December 3: 15:00 UTC.
  expect(event.startDate.toJSDate().toISOString()).toBe('2026-12-03T15:00:00.000Z');
});

test('the buyer opens the link from the mail without signing in, sees day and place, and says a morning', async ({
  page,
  site,
}) => {
  await page.setViewportSize(phone);
  await page.goto(arrivalPath);
  const heading = page.getByRole('heading', { level: 1 });
  await expect(heading).toContainText('Thursday');
  await expect(heading).toContainText('December 3');
  await expect(page.getByText(/Collect it at the Houston counter from 9:00 AM/)).toBeVisible();
  await expect(page.getByText(/photo ID in the name of Ines Calder/)).toBeVisible();
  const calendar = await page.request.get(
    (await page.getByRole('link', { name: 'Add to calendar' }).getAttribute('href')) ?? '',
  );
  expect(calendar.headers()['content-type']).toContain('text/calendar');
  expect(
    eventIn(await calendar.text())
      .event.startDate.toJSDate()
      .toISOString(),
  ).toBe('2026-12-03T15:00:00.000Z');

  await page.getByRole('button', { name: "I can't come" }).click();
  await page.getByRole('radiogroup', { name: 'Tue, Dec 8' }).getByRole('radio', { name: /Suits/ }).click();
  await expect(page.getByText('Kept: Tue, Dec 8 suits you.')).toBeVisible();
  await site.mailbox.find('breeder@example.org', /morning/i);
});

test('an admin closes the counter on that Thursday, sees first what it moves, and the parcel goes on hold', async ({
  page,
  site,
}) => {
  await page.setViewportSize(desk);
  await signIn(page, 'admin@example.org');
  await expect(page).toHaveURL(/\/desk$/);
  await page.getByRole('link', { name: 'Calendar' }).click();
  await page
    .getByRole('link', { name: /^Close / })
    .first()
    .click();
  await page.getByLabel('Title').fill('Houston counter floods');
  await page.getByLabel('Day', { exact: true }).fill('2026-12-03');
  await page.getByRole('radio', { name: 'One counter' }).check();
  await pick(page, 'Counter', /Houston counter/);
  await page.getByRole('button', { name: 'See what it moves' }).click();
  const dialog = page.getByRole('dialog');
  await expect(dialog).toContainText(code);
  await expect(dialog).toContainText(buyer.name);
  await dialog.getByRole('button', { name: /close|save/i }).click();
  await expect(page).toHaveURL(/\/blackouts$/);
  await expect(page.getByText('Houston counter floods').first()).toBeVisible();

  await expect
    .poll(
      async () =>
        (await site.mailbox.to(buyer.email)).some((mail) => mail.calendar?.includes('METHOD:CANCEL')),
      { timeout: 20_000 },
    )
    .toBe(true);
  await signOut(page);
  await signIn(page, 'breeder@example.org');
  await page
    .getByRole('link', { name: new RegExp('leopard gecko.*Houston', 'i') })
    .first()
    .click();
  await expect(page.getByText(/closed at Houston counter: Houston counter floods/)).toBeVisible();
  await expect(page.getByText('on hold', { exact: true }).first()).toBeVisible();
});

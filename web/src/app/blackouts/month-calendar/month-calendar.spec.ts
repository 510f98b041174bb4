import { TestKey } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import type { Blackout, BlackoutList } from '@shared/contract';
import { registerIcons } from '../../ui/icons/register-icons';
import { MonthCalendar } from './month-calendar';
import { MonthCalendarHarness } from './month-calendar-harness';

const blackout = (id: number, title: string, over: Partial<Blackout> = {}): Blackout => ({
  id,
  title,
  kind: 'range',
  startDate: null,
  endDate: null,
  rules: null,
  liftedDates: [],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  note: '',
  source: 'admin',
  createdAt: '2026-01-01T00:00:00.000Z',
  version: 1,
  ...over,
});

@Component({
  imports: [MonthCalendar],
  template: `<db-month-calendar
    month="2026-12"
    [list]="list"
    [names]="names"
    today="2026-12-01"
    [chosen]="chosen()"
    (choose)="chosen.set($event.date)"
  />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {
  readonly list: BlackoutList = {
    blackouts: [
      blackout(1, 'Christmas Day'),
      blackout(2, 'Hub works', { scope: 'carrier', carrierId: 3 }),
      blackout(3, 'Ice', { scope: 'state', state: 'AZ' }),
    ],
    days: [
      { date: '2026-12-08', blackoutId: 3 },
      { date: '2026-12-10', blackoutId: 3 },
      { date: '2026-12-24', blackoutId: 2 },
      { date: '2026-12-25', blackoutId: 1 },
      { date: '2026-12-25', blackoutId: 2 },
    ],
  };
  readonly names = { carriers: [{ id: 3, name: 'Larkspur Overnight', hubId: 1 }], counters: [] };
  readonly chosen = signal('2026-12-24');
}

describe('the month calendar on the page', () => {
  let page: Page;
  let calendar: MonthCalendarHarness;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient()] });
    TestBed.runInInjectionContext(registerIcons);
    const fixture = TestBed.createComponent(Page);
    page = fixture.componentInstance;
    calendar = await TestbedHarnessEnvironment.loader(fixture).getHarness(MonthCalendarHarness);
  });

  it('says of each day whether it is closed, by what and for whom', async () => {
    expect(await calendar.label('2026-12-01')).toBe('Tuesday, December 1, today, no blackout');
    expect(await calendar.label('2026-12-24')).toBe(
      'Thursday, December 24, closed: Hub works (Larkspur Overnight)',
    );
    expect(await calendar.label('2026-12-25')).toContain('Christmas Day (everywhere)');
  });

  it('is one stop for the Tab key, and the arrows move inside it', async () => {
    expect(await calendar.tabStops()).toBe(1);
    await calendar.key(TestKey.RIGHT_ARROW);
    expect(page.chosen()).toBe('2026-12-25');
    await calendar.key(TestKey.PAGE_UP);
    expect(page.chosen()).toBe('2026-11-25');
  });

  it('chooses the day that is pressed', async () => {
    await calendar.press('2026-12-08');
    expect(page.chosen()).toBe('2026-12-08');
  });

  it('tells the month in words, days in a row as a span and others one by one', async () => {
    expect(await calendar.legend()).toEqual([
      '8, 10 Ice, Arizona',
      '24–25 Hub works, Larkspur Overnight',
      '25 Christmas Day, everywhere',
    ]);
  });
});

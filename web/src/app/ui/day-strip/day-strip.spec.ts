import { type HarnessLoader, TestKey } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Settings } from 'luxon';
import type { DayVerdict, TemperatureUnit, Verdict } from '@shared/contract';
import { DayStrip } from './day-strip';
import { DayStripHarness } from './day-strip-harness';

const dayOf = (date: string, verdict: Verdict, rest: Partial<DayVerdict> = {}): DayVerdict => ({
  date,
  verdict,
  chance: null,
  lateChance: null,
  slackDays: 1,
  pack: 'none',
  arrival: { at: '2026-12-09T16:00:00.000Z', place: 'Flagstaff', zone: 'America/Phoenix' },
  outdoor: { lowF: 42, highF: 58 },
  inBox: null,
  reasons: [],
  leadDays: 1,
  forecastAt: null,
  run: null,
  ...rest,
});

@Component({
  imports: [DayStrip],
  template: `<db-day-strip
    [days]="days"
    [band]="band"
    [unit]="unit()"
    [chosen]="chosen()"
    (choose)="chosen.set($event)"
  />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {
  readonly days = [
    dayOf('2026-12-07', 'shut', {
      outdoor: null,
      reasons: [{ code: 'origin-closed', verdict: 'shut', text: '', values: {} }],
    }),
    dayOf('2026-12-08', 'open', {
      run: { id: 3, state: 'confirmed', roomL: 18.7 },
      reasons: [{ code: 'slack', verdict: 'open', text: '', values: {} }],
    }),
    dayOf('2026-12-09', 'tight'),
    dayOf('2026-12-10', 'far', { outdoor: null }),
  ];
  readonly band = { lowF: 60, highF: 86 };
  readonly unit = signal<TemperatureUnit>('F');
  readonly chosen = signal<string | null>(null);
}

describe('the day strip', () => {
  let loader: HarnessLoader;
  let page: Page;
  let strip: DayStripHarness;

  beforeEach(async () => {
    Settings.defaultLocale = 'en-US';
    Settings.now = () => Date.UTC(2026, 11, 1, 12);
    const fixture = TestBed.createComponent(Page);
    page = fixture.componentInstance;
    loader = TestbedHarnessEnvironment.loader(fixture);
    strip = await loader.getHarness(DayStripHarness);
  });

  it('names every day with its verdict, not by color alone', async () => {
    expect(await strip.days()).toEqual([
      'Monday, December 7: shut',
      'Tuesday, December 8: open',
      'Wednesday, December 9: tight',
      'Thursday, December 10: far',
    ]);
  });

  it('is entered at the first day that could be booked', async () => {
    expect(await strip.tabStop()).toBe('Tuesday, December 8: open');
  });

  it('moves with the arrows without choosing, and stays inside', async () => {
    await strip.pressOn(1, TestKey.RIGHT_ARROW);
    expect(await strip.tabStop()).toBe('Wednesday, December 9: tight');
    await strip.pressOn(2, TestKey.END);
    await strip.pressOn(3, TestKey.RIGHT_ARROW);
    expect(await strip.tabStop()).toBe('Thursday, December 10: far');
    await strip.pressOn(3, TestKey.HOME);
    expect(await strip.tabStop()).toBe('Monday, December 7: shut');
    expect(await strip.chosen()).toBeNull();
  });

  it('chooses a day', async () => {
    await strip.clickDay(2);
    expect(page.chosen()).toBe('2026-12-09');
    expect(await strip.chosen()).toBe('Wednesday, December 9: tight');
  });

  it('says the same in a table, in the unit of the person', async () => {
    await strip.toggleTable();
    page.unit.set('C');
    // 42 °F is 5.6 °C, 58 °F is 14.4 °C
    const rows = await strip.table();
    expect(rows).toHaveLength(4);
    expect(rows[1]).toContain('open');
    expect(rows[1]).toContain('6 to 14 °C');
    expect(rows[1]).toContain('18 L left');
    expect(rows[0]).toContain('–');
  });

  it('is silent about the box until somebody has worked it out', async () => {
    expect(await strip.legend()).not.toContain('inside the box');
  });

  it('says in two words why a day is shut, and nothing more of an open one', async () => {
    await strip.toggleTable();
    const rows = await strip.table();
    expect(rows[0]).toContain('no drop-off');
    expect(rows[1]).not.toContain('slack');
  });
});

import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { provideRouter } from '@angular/router';
import { Settings } from 'luxon';
import type { DaysAnswer, Parcel } from '@shared/contract';
import { DayStripHarness } from '../../ui/day-strip/day-strip-harness';
import { sampleDay, sampleParcel } from '../parcel-samples';
import { parcelSteps } from '../parcel-steps';
import { DayChoice, type DayBooking } from './day-choice';

const draft = sampleParcel({ state: 'draft', shipDate: null, arrivalDate: null });
const answer: DaysAnswer = {
  days: [
    sampleDay({ date: '2026-12-06', verdict: 'shut' }),
    sampleDay({ date: '2026-12-07', verdict: 'tight' }),
    sampleDay({ date: '2026-12-08', verdict: 'open' }),
  ],
  band: { lowF: 60, highF: 86 },
  route: {
    origin: 'San Antonio airport counter',
    hub: 'Larkspur sort hub',
    destination: 'Flagstaff counter',
    originZone: 'America/Chicago',
    destinationZone: 'America/Phoenix',
  },
  forecastAgeMinutes: 40,
};

@Component({
  imports: [DayChoice],
  template: `<db-day-choice
    [parcel]="parcel()"
    [answer]="answer"
    [steps]="steps()"
    [wanted]="wanted()"
    today="2026-12-06"
    (book)="booked.push($event)"
    (pack)="packed = packed + 1"
  />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {
  readonly answer = answer;
  readonly parcel = signal<Parcel>(draft);
  readonly steps = signal(parcelSteps(draft, { id: draft.breeder.id, roles: ['breeder'] }));
  readonly wanted = signal<string | undefined>(undefined);
  readonly booked: DayBooking[] = [];
  packed = 0;
}

describe('choosing a day', () => {
  let page: Page;
  const text = () => (fixture.nativeElement as HTMLElement).textContent ?? '';
  let fixture: ReturnType<typeof TestBed.createComponent<Page>>;
  const find = async () => {
    const loader = TestbedHarnessEnvironment.loader(fixture);
    return {
      strip: await loader.getHarness(DayStripHarness),
      go: () => loader.getHarness(MatButtonHarness.with({ selector: '.db-go' })),
      words: () => loader.getHarnessOrNull(MatInputHarness),
    };
  };

  beforeEach(() => {
    Settings.defaultLocale = 'en-US';
    Settings.now = () => Date.UTC(2026, 11, 1, 12);
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    fixture = TestBed.createComponent(Page);
    page = fixture.componentInstance;
  });

  it('begins with the first open day, which is booked without more ado', async () => {
    const { strip, go, words } = await find();
    expect(await strip.chosen()).toBe('Tuesday, December 8: open');
    expect(await words()).toBeNull();
    await (await go()).click();
    expect(page.booked).toEqual([{ date: '2026-12-08' }]);
  });

  it('books a tight day only with ten characters of acceptance', async () => {
    const { strip, go, words } = await find();
    await strip.clickDay(1);
    await (await go()).click();
    await (await words())?.setValue('   fine    ');
    await (await go()).click();
    expect(page.booked).toEqual([]);
    expect(text()).toContain('at least 10 characters');
    await (await words())?.setValue('The buyer waits at the counter.');
    await (await go()).click();
    expect(page.booked).toEqual([{ date: '2026-12-07', acceptTight: 'The buyer waits at the counter.' }]);
  });

  it('does not book a shut day', async () => {
    const { strip, go } = await find();
    await strip.clickDay(0);
    const button = await go();
    expect(await button.getText()).toBe('Sun, Dec 6 is shut');
    await button.click();
    expect(page.booked).toEqual([]);
  });

  it('begins with the booked day and offers to pack', async () => {
    page.parcel.set(sampleParcel({ shipDate: '2026-12-07' }));
    const { strip, go } = await find();
    expect(await strip.chosen()).toBe('Monday, December 7: tight');
    await (await go()).click();
    expect(page.packed).toBe(1);
    await strip.clickDay(2);
    expect(await (await go()).getText()).toBe('Move to Tue, Dec 8');
  });

  it('tells an admin who chooses, and offers no button', async () => {
    page.steps.set(parcelSteps(draft, { id: 1, roles: ['admin'] }));
    await find();
    expect(text()).toContain('The day is chosen by the breeder or a coordinator.');
    expect((fixture.nativeElement as HTMLElement).querySelector('.db-go')).toBeNull();
  });

  it('begins with the day that a route check had looked at', async () => {
    page.wanted.set('2026-12-07');
    const { strip } = await find();
    expect(await strip.chosen()).toBe('Monday, December 7: tight');
  });
});

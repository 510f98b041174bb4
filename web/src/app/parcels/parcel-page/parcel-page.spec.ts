import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { Settings } from 'luxon';
import type { DaysAnswer, SessionInfo } from '@shared/contract';
import { problemInterceptor } from '../../core/http/problem-interceptor';
import { SessionStore } from '../../core/session/session-store';
import { registerIcons } from '../../ui/icons/register-icons';
import { sampleDay, sampleParcel } from '../parcel-samples';
import { ParcelPage } from './parcel-page';

const draft = sampleParcel({ state: 'draft', shipDate: null, arrivalDate: null });
const answer: DaysAnswer = {
  days: [sampleDay({ date: '2026-12-08' }), sampleDay({ date: '2026-12-09' })],
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
const session: SessionInfo = {
  me: {
    id: draft.breeder.id,
    name: 'Hanna Weiss',
    email: 'breeder@example.org',
    roles: ['breeder'],
    businessName: null,
    zone: 'America/Chicago',
    temperatureUnit: 'F',
  },
  demo: false,
  circleName: 'Test circle',
  circleZone: 'America/Chicago',
};

const noForecast = {
  type: 'x',
  title: 'The forecast service does not answer',
  status: 503,
  code: 'forecast-unavailable',
  errors: [],
};
const fail = (message: string): never => {
  throw new Error(message);
};

describe('a parcel', () => {
  let http: HttpTestingController;
  let fixture: ReturnType<typeof TestBed.createComponent<ParcelPage>>;
  const text = () => page().textContent ?? '';
  const page = () => fixture.nativeElement as HTMLElement;
  const button = (label: string) =>
    [...page().querySelectorAll('button')].find((one) => one.textContent?.trim() === label) ??
    fail(`There is no button "${label}".`);
  const days = () => [...page().querySelectorAll<HTMLElement>('[role=radio]')];
  // Not through harnesses: they would wait for the very calls that these tests answer.
  const press = (element: HTMLElement | undefined) => {
    element?.click();
    TestBed.tick();
  };

  beforeEach(async () => {
    Settings.defaultLocale = 'en-US';
    Settings.now = () => Date.UTC(2026, 11, 1, 12);
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideHttpClient(withInterceptors([problemInterceptor])),
        provideHttpClientTesting(),
      ],
    });
    TestBed.runInInjectionContext(registerIcons);
    http = TestBed.inject(HttpTestingController);
    const ready = TestBed.inject(SessionStore).ready();
    http.expectOne('/api/session').flush(session);
    await ready;
    fixture = TestBed.createComponent(ParcelPage);
    fixture.componentRef.setInput('id', '14');
    TestBed.tick();
    http.expectOne('/api/parcels/14').flush(draft);
    await settle();
  });

  /** Lets the page ask for what follows and answers it. */
  async function settle(daysStatus = 200): Promise<void> {
    await new Promise((done) => setTimeout(done));
    TestBed.tick();
    for (const call of http.match('/api/parcels/14/days'))
      if (daysStatus === 200) call.flush(answer);
      else call.flush(noForecast, { status: daysStatus, statusText: 'No' });
    for (const call of http.match('/api/parcels/14/history')) call.flush([]);
    await fixture.whenStable();
  }

  const refuse = (status: number, code: string, rest: Record<string, unknown>) =>
    http
      .expectOne({ method: 'PUT', url: '/api/parcels/14/booking' })
      .flush({ type: 'x', title: 'No', status, code, errors: [], ...rest }, { status, statusText: 'No' });

  it('books a day on the version it was looked at', async () => {
    press(button('Book Tue, Dec 8'));
    const call = http.expectOne({ method: 'PUT', url: '/api/parcels/14/booking' });
    expect(call.request.body).toEqual({ date: '2026-12-08' });
    expect(call.request.headers.get('If-Match')).toBe('"3"');
    call.flush(sampleParcel({ version: 4 }));
    await settle();
    expect(text()).toContain('booked');
    expect(button('Mark as packed').getAttribute('aria-disabled')).not.toBe('true');
  });

  it('shows the present verdict of a day that is not offered any more', async () => {
    press(button('Book Tue, Dec 8'));
    refuse(409, 'day-not-offered', {
      detail: 'Tuesday, December 8 is shut for HC-0014.',
      current: sampleDay({ date: '2026-12-08', verdict: 'shut' }),
    });
    await settle();
    expect(text()).toContain('Tuesday, December 8 is shut for HC-0014.');
    expect(days().map((day) => day.getAttribute('aria-label'))).toEqual([
      'Tuesday, December 8: shut',
      'Wednesday, December 9: open',
    ]);
    expect(button('Tue, Dec 8 is shut').getAttribute('aria-disabled')).toBe('true');
  });

  it('forgets the refusal when another day is looked at', async () => {
    press(button('Book Tue, Dec 8'));
    refuse(409, 'day-not-offered', { detail: 'It is shut now.', current: sampleDay({ verdict: 'shut' }) });
    await settle();
    press(days()[1]);
    expect(text()).not.toContain('It is shut now.');
  });

  it('offers to load what somebody else changed meanwhile', async () => {
    press(button('Book Tue, Dec 8'));
    refuse(412, 'stale', {});
    await settle();
    expect(text()).toContain('Somebody changed this parcel meanwhile.');
    press(button('Load it again'));
    http.expectOne('/api/parcels/14').flush(sampleParcel({ version: 4, shipDate: '2026-12-09' }));
    await settle();
    expect(text()).not.toContain('meanwhile');
    expect(text()).toContain('ships Wed, Dec 9');
  });

  it('can be packed also while no forecast can be read', async () => {
    fixture.componentRef.setInput('id', '15');
    TestBed.tick();
    http.expectOne('/api/parcels/15').flush(sampleParcel());
    await settle(503);
    expect(text()).toContain('The forecast service does not answer');
    press(button('Mark as packed'));
    const call = http.expectOne({ method: 'PATCH', url: '/api/parcels/14' });
    expect(call.request.body).toEqual({ state: 'packed' });
    call.flush(sampleParcel({ state: 'packed', version: 4 }));
    await settle();
    expect(text()).toContain('Packed.');
  });
});

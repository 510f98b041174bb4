import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { provideRouter } from '@angular/router';
import type { Desk } from '@shared/contract';
import { registerIcons } from '../../ui/icons/register-icons';
import { DeskPage } from './desk-page';

const mail = {
  id: 5,
  to: 'fay@example.org',
  subject: 'Arrives Thursday',
  error: '550 unknown',
  at: '2026-12-01T13:00:00.000Z',
};
const desk = (over: Partial<Desk> = {}): Desk => ({
  forecasts: [],
  failedMail: [],
  mailWaiting: 0,
  runs: [],
  parcels: [],
  counts: { people: 30, parcels: 20, runs: 3 },
  ...over,
});

describe('the desk', () => {
  let fixture: ComponentFixture<DeskPage>;
  let http: HttpTestingController;
  const text = () => (fixture.nativeElement as HTMLElement).textContent;
  const answer = async (body: Desk) => {
    TestBed.tick();
    http.expectOne('/api/desk').flush(body);
    await fixture.whenStable();
  };

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])],
    });
    TestBed.runInInjectionContext(registerIcons);
    http = TestBed.inject(HttpTestingController);
    fixture = TestBed.createComponent(DeskPage);
  });
  afterEach(() => http.verify());

  it('says that all is well when nothing needs anybody', async () => {
    await answer(desk());
    expect(text()).toContain('All is well');
    expect(text()).toContain('Nothing waits for you.');
  });

  it('names what needs somebody, and what is as it should be', async () => {
    await answer(desk({ parcels: [{ id: 21, code: 'HC-0021', text: 'On hold: the counter is closed.' }] }));
    expect(text()).toContain('HC-0021');
    expect(text()).toContain('Mail, runs and forecasts are as they should be.');
    expect(text()).not.toContain('All is well');
  });

  it('sends a failed mail again, and looks once more', async () => {
    await answer(desk({ failedMail: [mail] }));
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const again = await loader.getHarness(MatButtonHarness.with({ text: 'Send again' }));
    await again.click();
    const sent = http.expectOne('/api/desk/mail/5/resend');
    expect(sent.request.method).toBe('POST');
    sent.flush(null);
    await new Promise((done) => setTimeout(done));
    await answer(desk());
    expect(text()).toContain('The mail to fay@example.org is in the queue again.');
    expect(text()).toContain('All is well');
  });

  it('offers another try when it cannot be read', async () => {
    TestBed.tick();
    http.expectOne('/api/desk').flush(null, { status: 500, statusText: 'Server error' });
    await fixture.whenStable();
    expect(text()).toContain('Try again');
  });
});

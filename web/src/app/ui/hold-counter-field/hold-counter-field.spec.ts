import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl } from '@angular/forms';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { CircleLists } from '../circle-lists';
import { HoldCounterField } from './hold-counter-field';

const flagstaff = {
  postalCode: '86001',
  city: 'Flagstaff',
  state: 'AZ',
  lat: 35.2,
  lon: -111.65,
  zone: 'America/Phoenix',
  nearest: [
    { counterId: 28, name: 'Flagstaff counter', city: 'Flagstaff', state: 'AZ', miles: 3.2 },
    { counterId: 11, name: 'Phoenix counter', city: 'Phoenix', state: 'AZ', miles: 122.7 },
  ],
};

@Component({
  imports: [HoldCounterField],
  providers: [CircleLists],
  template: `<db-hold-counter-field [control]="control" [counters]="[]" />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {
  readonly control = new FormControl<number | null>(null);
}

describe('finding a hold counter by ZIP code', () => {
  const open = async () => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    const fixture = TestBed.createComponent(Page);
    const loader = TestbedHarnessEnvironment.loader(fixture);
    const http = TestBed.inject(HttpTestingController);
    // The harnesses wait for calls under way, so the lists are answered first.
    TestBed.tick();
    for (const path of ['/api/species', '/api/boxes', '/api/counters']) http.expectOne(path).flush([]);
    const zip = await loader.getHarness(MatInputHarness);
    const settle = () => new Promise((done) => setTimeout(done, 250));
    return {
      control: fixture.componentInstance.control,
      text: () => (fixture.nativeElement as HTMLElement).textContent ?? '',
      radios: () => loader.getAllHarnesses(MatRadioButtonHarness),
      asked: () => http.match((request) => request.url.startsWith('/api/postal-codes/')),
      type: async (value: string) => {
        await zip.setValue(value);
        await settle();
      },
      stable: () => fixture.whenStable(),
    };
  };

  it('asks only for a whole ZIP code', async () => {
    const { type, asked } = await open();
    await type('8600');
    expect(asked()).toHaveLength(0);
  });

  it('takes the nearest and offers the next ones with their miles', async () => {
    const { type, asked, radios, control } = await open();
    await type('86001');
    asked()[0]?.flush(flagstaff);
    const labels = await Promise.all((await radios()).map((radio) => radio.getLabelText()));
    expect(control.value).toBe(28);
    expect(labels).toEqual(['Flagstaff counter, AZ 3 mi', 'Phoenix counter, AZ 123 mi']);
  });

  it('leaves alone what somebody chose themselves', async () => {
    const { type, asked, control } = await open();
    control.setValue(5);
    await type('86001');
    asked()[0]?.flush(flagstaff);
    expect(control.value).toBe(5);
  });

  it('follows another ZIP code as long as nobody chose', async () => {
    const { type, asked, control } = await open();
    await type('86001');
    asked()[0]?.flush(flagstaff);
    await type('85001');
    asked()[0]?.flush({ ...flagstaff, nearest: [flagstaff.nearest[1]] });
    expect(control.value).toBe(11);
  });

  it('says when a ZIP code is not known, and chooses nothing', async () => {
    const { type, asked, control, text, stable } = await open();
    await type('00000');
    asked()[0]?.flush(
      { type: 'x', title: 'Not found', status: 404, code: 'not-found', errors: [] },
      { status: 404, statusText: 'Not Found' },
    );
    await stable();
    expect(text()).toContain('That ZIP code is not known.');
    expect(control.value).toBeNull();
  });
});

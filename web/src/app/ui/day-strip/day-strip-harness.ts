import { ComponentHarness, type TestKey } from '@angular/cdk/testing';

/** Drives a `<db-day-strip>` the way a person does, by days and keys. */
export class DayStripHarness extends ComponentHarness {
  static readonly hostSelector = 'db-day-strip';

  private readonly radios = this.locatorForAll('[role=radio]');
  private readonly toggle = this.locatorFor('.under button');
  private readonly legendNote = this.locatorFor('.legend');
  private readonly tableRows = this.locatorForAll('tbody tr');

  /** The accessible names of all days, in order. */
  async days(): Promise<string[]> {
    const radios = await this.radios();
    return Promise.all(radios.map(async (radio) => (await radio.getAttribute('aria-label')) ?? ''));
  }

  /** The name of the chosen day, or null. */
  async chosen(): Promise<string | null> {
    for (const radio of await this.radios())
      if ((await radio.getAttribute('aria-checked')) === 'true') return radio.getAttribute('aria-label');
    return null;
  }

  /** The name of the one day that Tab reaches. */
  async tabStop(): Promise<string | null> {
    for (const radio of await this.radios())
      if ((await radio.getAttribute('tabindex')) === '0') return radio.getAttribute('aria-label');
    return null;
  }

  async clickDay(index: number): Promise<void> {
    await (await this.radio(index)).click();
  }

  async pressOn(index: number, key: TestKey): Promise<void> {
    await (await this.radio(index)).sendKeys(key);
  }

  async toggleTable(): Promise<void> {
    await (await this.toggle()).click();
  }

  /** The cells' texts of the table's rows. */
  async table(): Promise<string[]> {
    const rows = await this.tableRows();
    return Promise.all(rows.map((row) => row.text()));
  }

  /** What the picture's signs mean. */
  async legend(): Promise<string> {
    return (await this.legendNote()).text();
  }

  private async radio(index: number) {
    const radio = (await this.radios())[index];
    if (!radio) throw new Error(`The strip has no day ${index}.`);
    return radio;
  }
}

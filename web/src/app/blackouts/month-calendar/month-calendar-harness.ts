import { ComponentHarness, type TestKey } from '@angular/cdk/testing';

/** One month of the calendar, as a person meets it. */
export class MonthCalendarHarness extends ComponentHarness {
  static hostSelector = 'db-month-calendar';

  private readonly chosen = this.locatorFor('button[tabindex="0"]');
  private readonly reachable = this.locatorForAll('button[tabindex="0"]');

  /** What a screen reader says of a day. */
  async label(date: string): Promise<string | null> {
    return (await this.locatorFor(`[data-date="${date}"]`)()).getAttribute('aria-label');
  }

  /** Presses a day. */
  async press(date: string): Promise<void> {
    await (await this.locatorFor(`[data-date="${date}"]`)()).click();
  }

  /** Presses a key on the chosen day. */
  async key(key: TestKey): Promise<void> {
    await (await this.chosen()).sendKeys(key);
  }

  /** How many days the Tab key reaches. */
  async tabStops(): Promise<number> {
    return (await this.reachable()).length;
  }

  /** The lines under a grid that is too narrow for titles. */
  async legend(): Promise<string[]> {
    const days = await this.locatorForAll('.legend b')();
    const words = await this.locatorForAll('.legend span')();
    return Promise.all(
      days.map(async (day, row) => `${await day.text()} ${(await words[row]?.text()) ?? ''}`),
    );
  }
}

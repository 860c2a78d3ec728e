import { ComponentHarness, type TestElement, type TestKey } from '@angular/cdk/testing';

export class FloorHarness extends ComponentHarness {
  static readonly hostSelector = 'tw-floor';
  readonly #bays = this.locatorForAll('[role="gridcell"]');

  async bayNames(): Promise<(string | null)[]> {
    return Promise.all((await this.#bays()).map((bay) => bay.getAttribute('aria-label')));
  }

  async tabStops(): Promise<(string | null)[]> {
    return this.#labelsWhere(async (bay) => (await bay.getAttribute('tabindex')) === '0');
  }

  async chosen(): Promise<(string | null)[]> {
    return this.#labelsWhere(async (bay) => (await bay.getAttribute('aria-selected')) === 'true');
  }

  async focused(): Promise<string | null | undefined> {
    return (await this.#labelsWhere((bay) => bay.isFocused()))[0];
  }

  async click(label: string): Promise<void> {
    await (await this.#bay(label)).click();
  }

  async focus(label: string): Promise<void> {
    await (await this.#bay(label)).focus();
  }

  async press(label: string, key: TestKey): Promise<void> {
    await (await this.#bay(label)).sendKeys(key);
  }

  async caption(): Promise<string> {
    return (await this.locatorFor('.caption')()).text();
  }

  #bay(label: string): Promise<TestElement> {
    return this.locatorFor(`[data-bay="${label}"]`)();
  }

  async #labelsWhere(test: (bay: TestElement) => Promise<boolean>): Promise<(string | null)[]> {
    const found: (string | null)[] = [];
    for (const bay of await this.#bays()) {
      if (await test(bay)) found.push(await bay.getAttribute('data-bay'));
    }
    return found;
  }
}

import { ComponentHarness } from '@angular/cdk/testing';

export class ListShellHarness extends ComponentHarness {
  static readonly hostSelector = 'tw-list-shell';

  async text(): Promise<string> {
    return (await this.host()).text();
  }

  async range(): Promise<string> {
    return (await this.locatorFor('.range')()).text();
  }

  async buttons(): Promise<string[]> {
    return Promise.all((await this.locatorForAll('button')()).map((button) => button.text()));
  }

  async press(label: string): Promise<void> {
    for (const button of await this.locatorForAll('button')()) {
      if ((await button.text()) === label) return button.click();
    }
    throw new Error(`The list has no button "${label}"`);
  }
}

import { expect, type Locator, type Page } from '@playwright/test';

const farthest = 120;

/** Somebody who has a keyboard and nothing else. */
export class Keys {
  constructor(private readonly page: Page) {}

  press(key: string): Promise<void> {
    return this.page.keyboard.press(key);
  }

  type(text: string): Promise<void> {
    return this.page.keyboard.type(text);
  }

  /** Goes on from stop to stop until the wanted one has the focus. */
  async to(wanted: Locator): Promise<void> {
    await wanted.waitFor({ state: 'attached' });
    for (let stops = 0; stops < farthest; stops++) {
      if (await this.isAt(wanted)) return this.expectSeen(wanted);
      await this.press('Tab');
    }
    throw new Error(`The Tab key does not lead to ${String(wanted)}.`);
  }

  async enter(wanted: Locator): Promise<void> {
    await this.to(wanted);
    await this.press('Enter');
  }

  async write(wanted: Locator, text: string): Promise<void> {
    await this.to(wanted);
    await this.press('ControlOrMeta+a');
    await this.type(text);
  }

  async tick(wanted: Locator): Promise<void> {
    await this.to(wanted);
    await this.press('Space');
  }

  /** A group of radio buttons is one stop; the arrow keys choose in it. */
  async choose(group: Locator, choice: Locator): Promise<void> {
    const radios = group.getByRole('radio');
    for (let stops = 0; !(await this.isWithin(group)); stops++) {
      if (stops > farthest) throw new Error(`The Tab key does not lead to ${String(group)}.`);
      await this.press('Tab');
    }
    if (await this.isAt(choice)) await this.press('Space');
    for (let steps = await radios.count(); steps > 0 && !(await choice.isChecked()); steps--) {
      await this.press('ArrowDown');
    }
    await expect(choice).toBeChecked();
  }

  private isAt(wanted: Locator): Promise<boolean> {
    return wanted.evaluate((element) => element === document.activeElement);
  }

  private isWithin(wanted: Locator): Promise<boolean> {
    return wanted.evaluate((element) => element.contains(document.activeElement));
  }

  /** What has the focus must look different from when it has not. */
  private async expectSeen(wanted: Locator): Promise<void> {
    const shown = await this.picture(wanted);
    await wanted.evaluate((element) => (element as HTMLElement).blur());
    const without = await this.picture(wanted);
    await wanted.evaluate((element) => (element as HTMLElement).focus());
    expect.soft(shown.equals(without), `the focus on ${String(wanted)} is seen`).toBe(false);
  }

  /** With its surroundings, because the mark of a focus may lie around it or on its label. */
  private async picture(wanted: Locator): Promise<Buffer> {
    const around = await wanted.evaluate((element) => {
      const box = (element.closest('label') ?? element).getBoundingClientRect();
      return { x: box.x - 12, y: box.y - 12, width: box.width + 24, height: box.height + 24 };
    });
    const { width, height } = this.page.viewportSize() ?? { width: 0, height: 0 };
    const x = Math.max(0, around.x);
    const y = Math.max(0, around.y);
    return this.page.screenshot({
      clip: {
        x,
        y,
        width: Math.min(width - x, around.width),
        height: Math.min(height - y, around.height),
      },
    });
  }
}

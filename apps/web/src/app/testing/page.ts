import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { type Type } from '@angular/core';
import { type HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { settled } from './session';

/** One page opened at its address over a server that answers as the spec says. */
export class PageUnderTest {
  readonly server = TestBed.inject(HttpTestingController);
  readonly #harness: RouterTestingHarness;

  private constructor(harness: RouterTestingHarness) {
    this.#harness = harness;
    document.body.append(harness.fixture.nativeElement as HTMLElement);
  }

  static async open(page: Type<unknown>, path: string, address: string): Promise<PageUnderTest> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path, component: page },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    const opened = new PageUnderTest(await RouterTestingHarness.create(address));
    await opened.rest();
    return opened;
  }

  get text(): string {
    return this.#harness.routeNativeElement?.textContent ?? '';
  }

  get address(): string {
    return TestBed.inject(Router).url;
  }

  get loader(): HarnessLoader {
    return TestbedHarnessEnvironment.loader(this.#harness.fixture);
  }

  async fill(label: string, value: string): Promise<void> {
    const field = await this.loader.getHarness(
      MatFormFieldHarness.with({ floatingLabelText: label }),
    );
    await (await field.getControl(MatInputHarness))?.setValue(value);
  }

  async check(label: string): Promise<void> {
    const box = await this.loader.getHarness(MatCheckboxHarness.with({ label }));
    await box.check();
  }

  async press(label: string): Promise<void> {
    const button = await this.loader.getHarness(MatButtonHarness.with({ text: label }));
    await button.click();
    await this.rest();
  }

  /** Answers the one call to `url` that waits, and gives back what was sent with it. */
  async answer(url: string, body: object | null, status = 200): Promise<unknown> {
    const call = this.server.expectOne(url);
    call.flush(body, { status, statusText: String(status) });
    await this.rest();
    return call.request.body;
  }

  /**
   * Lets everything that waits for a promise go on, and shows it. A page that loads something is not
   * stable before the spec answers, so it is not waited for longer than drawing takes.
   */
  async rest(): Promise<void> {
    await settled();
    await Promise.race([this.#harness.fixture.whenStable(), drawn()]);
  }
}

function drawn(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 25));
}

/** A problem document as the server answers it. */
export function aProblem(kind: string, status: number, more: object = {}): object {
  return { type: `/problems/${kind}`, title: `Title of ${kind}`, status, ...more };
}

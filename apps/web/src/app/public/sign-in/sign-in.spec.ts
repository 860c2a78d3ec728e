import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { anAnswer, settled } from '../../testing/session';
import { SignIn } from './sign-in';

const unauthorized = { status: 401, statusText: 'Unauthorized' };

describe('SignIn', () => {
  let server: HttpTestingController;
  let page: RouterTestingHarness;

  beforeEach(async () => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'sign-in', component: SignIn },
            { path: '**', children: [] },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    server = TestBed.inject(HttpTestingController);
    page = await RouterTestingHarness.create('/sign-in?next=%2Ffield%2Fday');
    document.body.append(page.fixture.nativeElement as HTMLElement);
  });

  afterEach(() => server.verify());

  const loader = () => TestbedHarnessEnvironment.loader(page.fixture);
  const text = () => page.routeNativeElement?.textContent ?? '';

  async function fill(label: string, value: string): Promise<void> {
    const field = await loader().getHarness(MatFormFieldHarness.with({ floatingLabelText: label }));
    await (await field.getControl(MatInputHarness))?.setValue(value);
  }

  async function send(): Promise<void> {
    const button = await loader().getHarness(MatButtonHarness.with({ text: 'Sign in' }));
    await button.click();
  }

  async function answered(body: object, status?: typeof unauthorized): Promise<object> {
    const call = server.expectOne('/api/session');
    call.flush(body, status);
    await settled();
    await page.fixture.whenStable();
    return call.request.body as object;
  }

  it('asks the server nothing about an empty form', async () => {
    await send();
    const fields = await loader().getAllHarnesses(MatFormFieldHarness);
    expect(await Promise.all(fields.map((field) => field.getTextErrors()))).toEqual([
      ['Fill this in.'],
      ['Fill this in.'],
    ]);
  });

  it('says when it is refused, keeps the address, and goes where the person wanted to', async () => {
    await fill('E-mail address', 'imre@example.com');
    await fill('Password', 'wrong');
    await send();
    const title = 'E-mail address or password is not right';
    await answered({ type: '/problems/sign-in-refused', title, status: 401 }, unauthorized);
    expect(text()).toContain(title);

    await fill('Password', 'laundry soap');
    await send();
    const sent = await answered(anAnswer());
    expect(sent).toEqual({ email: 'imre@example.com', password: 'laundry soap' });
    await settled();
    expect(TestBed.inject(Router).url).toBe('/field/day');
  });

  it('asks for the one-time code only when the server does', async () => {
    const refusal = { type: '/problems/code-required', title: 'A code is needed', status: 401 };
    expect(text()).not.toContain('One-time code');
    await fill('E-mail address', 'imre@example.com');
    await fill('Password', 'laundry soap');
    await send();
    await answered(refusal, unauthorized);
    expect(text()).toContain('One-time code');

    await fill('One-time code', '000000');
    await send();
    await answered(refusal, unauthorized);
    expect(text()).toContain('This code does not fit. Try the next one.');

    await fill('One-time code', '287082');
    await send();
    expect(await answered(anAnswer())).toEqual({
      email: 'imre@example.com',
      password: 'laundry soap',
      code: '287082',
    });
  });

  it('takes a recovery code in place of a one-time code', async () => {
    const refusal = { type: '/problems/code-required', title: 'A code is needed', status: 401 };
    await fill('E-mail address', 'imre@example.com');
    await fill('Password', 'laundry soap');
    await send();
    await answered(refusal, unauthorized);
    const other = MatButtonHarness.with({ text: 'Authenticator lost? Use a recovery code' });
    await (await loader().getHarness(other)).click();
    const field = document.querySelector<HTMLInputElement>('#tw-sign-in-code');
    expect(field?.inputMode || field?.getAttribute('inputmode')).toBe('text');

    await fill('Recovery code', 'k7mfw-2hqzx');
    await send();
    expect(await answered(anAnswer())).toMatchObject({ code: 'k7mfw-2hqzx' });
  });
});

import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Title } from '@angular/platform-browser';
import { provideRouter, RouterOutlet, TitleStrategy } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { settled } from '../../testing/session';
import { Announcer } from './announcer';
import { Arrival } from './arrival';
import { mailedToken } from './mailed-token';
import { Titles } from './titles';

@Component({
  selector: 'tw-stores',
  template: '<main tabindex="-1"><h1 tabindex="-1">Stores</h1></main>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Stores {}

@Component({
  selector: 'tw-plain',
  template: '<main tabindex="-1">No heading yet</main>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Plain {}

@Component({
  selector: 'tw-mailed',
  template: '<main>{{ token }}</main>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Mailed {
  readonly token = mailedToken();
}

@Component({
  selector: 'tw-area',
  imports: [RouterOutlet],
  template: '<router-outlet />',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Area {}

describe('arriving at a page', () => {
  const announce = jest.fn();
  let harness: RouterTestingHarness;

  beforeEach(async () => {
    announce.mockClear();
    TestBed.configureTestingModule({
      providers: [
        { provide: TitleStrategy, useExisting: Titles },
        { provide: Announcer, useValue: { announce } },
        provideRouter([
          {
            path: 'shop',
            component: Area,
            data: { area: 'Shop' },
            children: [
              { path: 'stores', title: 'Stores', component: Stores },
              { path: 'plain', title: 'Plain', component: Plain },
            ],
          },
          { path: 'mailed', component: Mailed },
        ]),
      ],
    });
    TestBed.inject(Arrival).watch();
    harness = await RouterTestingHarness.create('/shop/stores');
    document.body.append(harness.fixture.nativeElement as HTMLElement);
    await settled();
  });

  it('names page, area and product', () => {
    expect(TestBed.inject(Title).getTitle()).toBe('Stores · Shop · Tumblewright');
    TestBed.inject(Titles).name('Foxglove Lane');
    expect(TestBed.inject(Title).getTitle()).toBe('Foxglove Lane · Shop · Tumblewright');
  });

  it('leaves the first page to the browser', () => {
    expect(announce).not.toHaveBeenCalled();
    expect(document.activeElement).toBe(document.body);
  });

  it('announces the next page and moves the focus to its head', async () => {
    await harness.navigateByUrl('/shop/plain');
    await settled();
    expect(announce).toHaveBeenCalledWith('Plain · Shop · Tumblewright');
    expect(document.activeElement?.tagName).toBe('MAIN');
    (document.activeElement as HTMLElement).blur();
    await harness.navigateByUrl('/shop/stores');
    await settled();
    expect(document.activeElement?.tagName).toBe('H1');
  });

  it('takes filters in the address for the same page', async () => {
    await harness.navigateByUrl('/shop/stores?state=down');
    await settled();
    expect(announce).not.toHaveBeenCalled();
  });

  it.each(['/mailed#token=abc_1', '/mailed?token=abc_1'])(
    'reads the secret of %s and takes it out of the address',
    async (address) => {
      await harness.navigateByUrl(address);
      await settled();
      expect(harness.routeNativeElement?.textContent).toBe('abc_1');
    },
  );
});

describe('announcing', () => {
  it('changes an unseen live region that was there before, also for the same words', () => {
    jest.useFakeTimers();
    const announcer = TestBed.inject(Announcer);
    const region = document.querySelector('[aria-live="polite"].tw-unseen');
    expect(region?.textContent).toBe('');
    for (let times = 0; times < 2; times++) {
      announcer.announce('Stores');
      expect(region?.textContent).toBe('');
      jest.runAllTimers();
      expect(region?.textContent).toBe('Stores');
    }
    jest.useRealTimers();
  });
});

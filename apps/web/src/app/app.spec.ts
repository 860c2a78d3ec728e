import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { anAnswer, settled } from './testing/session';
import { App } from './app';
import { Messages } from './core/messages/messages';
import { Session } from './core/session/session';

@Component({
  selector: 'tw-some-page',
  template: '<main tabindex="-1">page</main>',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class SomePage {}

describe('App', () => {
  beforeEach(() => {
    localStorage.clear();
    document.body.innerHTML = '<a class="tw-skip" href="#main">Skip</a>';
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', component: SomePage }]),
      ],
    });
  });

  async function started() {
    const fixture = TestBed.createComponent(App);
    document.body.append(fixture.nativeElement as HTMLElement);
    await TestBed.inject(Router).navigateByUrl('/shop/calls?state=open');
    await fixture.whenStable();
    return fixture;
  }

  it('skips to the content', async () => {
    await started();
    document.querySelector<HTMLElement>('.tw-skip')?.click();
    expect(document.activeElement?.tagName).toBe('MAIN');
  });

  it('leads to sign-in when the session has ended, and remembers where', async () => {
    const fixture = await started();
    const session = TestBed.inject(Session);
    session.take(anAnswer());
    session.ended.update((n) => n + 1);
    await fixture.whenStable();
    await settled();
    expect(TestBed.inject(Router).url).toBe('/sign-in?next=%2Fshop%2Fcalls%3Fstate%3Dopen');
    expect(TestBed.inject(Messages).message()?.text).toContain('Your session has ended');
  });
});

import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { anAnswer } from '../../testing/session';
import { forRoles, knownPerson, may, signedIn, toOwnArea } from './guards';
import { Session } from './session';

@Component({
  selector: 'tw-page',
  template: 'page',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Page {}

@Component({
  selector: 'tw-refusal',
  template: 'refusal',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Refusal {}

describe('guards', () => {
  let harness: RouterTestingHarness;

  beforeEach(async () => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: '', pathMatch: 'full', canActivate: [toOwnArea], children: [] },
          {
            path: 'field',
            canMatch: [forRoles('tech')],
            canActivate: [signedIn],
            children: [
              { path: '', component: Page },
              { path: 'visits', canActivate: [may('visits.read')], component: Page },
              { path: 'prices', canActivate: [may('prices.change')], component: Page },
            ],
          },
          { path: 'client', canMatch: [forRoles('client_owner')], component: Page },
          { path: 'client', component: Refusal },
          { path: 'memberships', canActivate: [knownPerson], component: Page },
          { path: 'sign-in', component: Page },
          { path: 'no-entry', component: Refusal },
        ]),
      ],
    });
    harness = await RouterTestingHarness.create();
  });

  const url = () => TestBed.inject(Router).url;
  const shown = () => harness.routeNativeElement?.textContent;

  it('asks to sign in, and remembers where the person wanted to go', async () => {
    await harness.navigateByUrl('/field/visits?day=2031-05-06');
    expect(url()).toBe('/sign-in?next=%2Ffield%2Fvisits%3Fday%3D2031-05-06');
  });

  it('leads from the root to the own area', async () => {
    await harness.navigateByUrl('/');
    expect(url()).toBe('/sign-in');
    TestBed.inject(Session).take(anAnswer());
    await harness.navigateByUrl('/');
    expect(url()).toBe('/field');
  });

  it('lets in where the role may, and says so where it may not', async () => {
    TestBed.inject(Session).take(anAnswer());
    await harness.navigateByUrl('/field/visits');
    expect(shown()).toBe('page');
    await harness.navigateByUrl('/field/prices');
    expect(shown()).toBe('refusal');
  });

  it('does not even load an area of other roles', async () => {
    TestBed.inject(Session).take(anAnswer());
    await harness.navigateByUrl('/client');
    expect(shown()).toBe('refusal');
  });

  it('asks a person of no membership to choose one', async () => {
    TestBed.inject(Session).take(anAnswer({ membership: null, shop: null, permissions: [] }));
    await harness.navigateByUrl('/field');
    expect(url()).toBe('/memberships');
  });
});

import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { anAnswer, settled } from '../../testing/session';
import { Messages } from '../messages/messages';
import { areas } from '../navigation/areas';
import { Connection } from '../offline/connection';
import { LocalKeepings } from '../session/leaving';
import { Session } from '../session/session';
import { AreaFrame } from './area-frame';

describe('AreaFrame', () => {
  let server: HttpTestingController;

  beforeEach(() => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: '**', children: [] }]),
      ],
    });
    server = TestBed.inject(HttpTestingController);
    TestBed.inject(Session).take(anAnswer());
  });

  async function framed() {
    const fixture = TestBed.createComponent(AreaFrame);
    fixture.componentRef.setInput('area', areas.field);
    fixture.componentRef.setInput('items', [
      { label: 'Day', link: '/field/day' },
      { label: 'Visits', link: '/field/visits', needs: 'visits.read' },
      { label: 'Prices', link: '/field/prices', needs: 'prices.change' },
    ]);
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    const press = async (label: string) => {
      const buttons = [...host.querySelectorAll('button')];
      buttons.find((button) => button.textContent?.includes(label))?.click();
      await fixture.whenStable();
      await settled();
      await fixture.whenStable();
    };
    return { fixture, host, press };
  }

  it('shows the way only to what the role may see', async () => {
    const { host } = await framed();
    const links = [...host.querySelectorAll('nav a')].map((link) => link.textContent);
    expect(links).toEqual(['Day', 'Visits']);
    expect(host.getAttribute('data-copy')).toBe('canary');
  });

  it('opens and closes the menu, and closes it on the way', async () => {
    const { fixture, host, press } = await framed();
    const menu = () => host.querySelector('.menu')?.getAttribute('aria-expanded');
    await press('Menu');
    expect(menu()).toBe('true');
    await TestBed.inject(Router).navigateByUrl('/field/visits');
    await fixture.whenStable();
    expect(menu()).toBe('false');
  });

  it('says what just happened, that there is no connection, and that the shop is paused', async () => {
    const { fixture, host } = await framed();
    TestBed.inject(Messages).say('Visit 0412 was cancelled.');
    TestBed.inject(Connection).online.set(false);
    const answer = anAnswer();
    TestBed.inject(Session).take({
      ...answer,
      shop: answer.shop && { ...answer.shop, mayWrite: false },
    });
    await fixture.whenStable();
    expect(host.textContent).toContain('Visit 0412 was cancelled.');
    expect(host.textContent).toContain('No connection.');
    expect(host.textContent).toContain('Thornbury Appliance Works is paused');
  });

  it('leaves the page of one membership before it goes on as another', async () => {
    const { press } = await framed();
    const router = TestBed.inject(Router);
    await router.navigateByUrl('/field/day');
    await press('Imre Valdo');
    await press('Alder & Finch Laundries');
    expect(router.url).toBe('/memberships');
    server
      .expectOne('/api/session/membership')
      .flush(anAnswer({ membership: anAnswer().memberships[1] ?? null }));
    await settled();
    expect(router.url).toBe('/');
  });

  it('stays who one is when the page may not be left', async () => {
    const { press } = await framed();
    const router = TestBed.inject(Router);
    router.resetConfig([
      { path: 'field/form', canDeactivate: [() => false], children: [] },
      { path: '**', children: [] },
    ]);
    await router.navigateByUrl('/field/form');
    await press('Imre Valdo');
    await press('Alder & Finch Laundries');
    server.expectNone('/api/session/membership');
    expect(router.url).toBe('/field/form');
  });

  it('goes back to the page when there is no going on', async () => {
    const { press } = await framed();
    const router = TestBed.inject(Router);
    await router.navigateByUrl('/field/day');
    await press('Imre Valdo');
    await press('Alder & Finch Laundries');
    server.expectOne('/api/session/membership').error(new ProgressEvent('error'));
    await settled();
    expect(router.url).toBe('/field/day');
    expect(TestBed.inject(Session).role()).toBe('tech');
  });

  it('goes on as another membership', async () => {
    const { host, press } = await framed();
    await press('Imre Valdo');
    expect(host.querySelector('.panel')?.textContent).toContain('Alder & Finch Laundries');
    await press('Alder & Finch Laundries');
    const call = server.expectOne('/api/session/membership');
    expect(call.request.body).toEqual({ membershipId: 'm2' });
    call.flush(anAnswer({ membership: anAnswer().memberships[1] ?? null }));
    await settled();
    expect(TestBed.inject(Session).role()).toBe('client_owner');
  });

  it('gives the focus back when the account panel is closed by key', async () => {
    const { fixture, host, press } = await framed();
    document.body.append(host);
    await press('Imre Valdo');
    host
      .querySelector('.panel')
      ?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }));
    await fixture.whenStable();
    expect(host.querySelector('.panel')).toBeNull();
    expect(document.activeElement?.textContent).toContain('Imre Valdo');
  });

  it('signs out, and says so when there was no answer', async () => {
    const { press } = await framed();
    await press('Imre Valdo');
    await press('Sign out');
    server.expectOne('/api/session').error(new ProgressEvent('error'));
    await settled();
    expect(TestBed.inject(Messages).message()?.text).toContain('You are still signed in');
    await press('Imre Valdo');
    await press('Sign out');
    server.expectOne('/api/session').flush(null);
    await settled();
    expect(TestBed.inject(Session).signedIn()).toBe(false);
    expect(TestBed.inject(Router).url).toBe('/sign-in');
  });

  it('asks first when something on the device would be lost', async () => {
    HTMLDialogElement.prototype.showModal = function (this: HTMLDialogElement) {
      this.open = true;
    };
    TestBed.inject(LocalKeepings).add({
      wouldLose: () => Promise.resolve('4 acts have not been sent.'),
      wipe: () => Promise.resolve(),
    });
    const { press } = await framed();
    await press('Imre Valdo');
    await press('Sign out');
    for (let n = 0; n < 20 && !document.querySelector('dialog'); n++) await settled();
    expect(document.querySelector('dialog')?.textContent).toContain('4 acts have not been sent.');
    server.expectNone('/api/session');
  });
});

import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { Reading } from '@lib/ui/format/reading';
import { firstValueFrom } from 'rxjs';
import { anAnswer, settled } from '../../testing/session';
import { Api } from '../api/api';
import { isProblem } from '../api/problem';
import { LocalKeepings } from './leaving';
import { Session } from './session';
import { sessionInterceptor } from './session-interceptor';

const ranOut = { type: '/problems/not-signed-in', title: 'Sign in to go on', status: 401 };
const unauthorized = { status: 401, statusText: 'Unauthorized' };

describe('Session', () => {
  let session: Session;
  let server: HttpTestingController;

  beforeEach(() => {
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([sessionInterceptor])),
        provideHttpClientTesting(),
      ],
    });
    session = TestBed.inject(Session);
    server = TestBed.inject(HttpTestingController);
  });

  afterEach(() => server.verify());

  async function signedIn(change: Partial<ReturnType<typeof anAnswer>> = {}): Promise<void> {
    const done = session.signIn({ email: 'imre@example.com', password: 'laundry soap' });
    server.expectOne('/api/session').flush(anAnswer(change));
    await done;
    TestBed.tick();
  }

  it('does not ask the server about a browser that never signed in', async () => {
    await session.start();
    expect(session.signedIn()).toBe(false);
  });

  it('knows who, as what, and how they read after signing in', async () => {
    await signedIn();
    expect(session.person()?.name).toBe('Imre Valdo');
    expect(session.may('visits.read')).toBe(true);
    expect(session.may('settings.change')).toBe(false);
    expect(TestBed.inject(Reading).currency()).toBe('GBP');
  });

  it('keeps no token on the device', async () => {
    await signedIn();
    expect(JSON.stringify({ ...localStorage })).toContain('Imre Valdo');
    expect(JSON.stringify({ ...localStorage })).not.toContain('token-1');
  });

  it('picks an earlier session up with the refresh cookie', async () => {
    localStorage.setItem('tw.session', JSON.stringify(anAnswer()));
    const started = session.start();
    server.expectOne('/api/session/refresh').flush(anAnswer({ accessToken: 'token-2' }));
    await started;
    expect(session.token()).toBe('token-2');
  });

  it('lets a person in without a signal, as they were known last', async () => {
    localStorage.setItem('tw.session', JSON.stringify(anAnswer()));
    const started = session.start();
    server.expectOne('/api/session/refresh').error(new ProgressEvent('error'));
    await started;
    expect(session.signedIn()).toBe(true);
    expect(session.token()).toBeUndefined();
  });

  it('forgets a session that the server has ended', async () => {
    localStorage.setItem('tw.session', JSON.stringify(anAnswer()));
    const started = session.start();
    server.expectOne('/api/session/refresh').flush(ranOut, unauthorized);
    await started;
    expect(session.signedIn()).toBe(false);
    expect(session.ended()).toBe(1);
    expect(localStorage.getItem('tw.session')).toBeNull();
  });

  it('renews once for all calls that find the token run out, and repeats each', async () => {
    await signedIn();
    const api = TestBed.inject(Api);
    const answers = Promise.all([
      firstValueFrom(api.call('session.list')),
      firstValueFrom(api.call('session.list')),
    ]);
    for (const call of server.match('/api/sessions')) {
      expect(call.request.headers.get('Authorization')).toBe('Bearer token-1');
      call.flush(ranOut, unauthorized);
    }
    await settled();
    server.expectOne('/api/session/refresh').flush(anAnswer({ accessToken: 'token-2' }));
    await settled();
    const repeats = server.match('/api/sessions');
    expect(repeats.map(({ request }) => request.headers.get('Authorization'))).toEqual([
      'Bearer token-2',
      'Bearer token-2',
    ]);
    repeats.forEach((call) => call.flush({ items: [] }));
    expect(await answers).toEqual([{ items: [] }, { items: [] }]);
  });

  it('asks again under the same key when an answer to renewing got lost', async () => {
    await signedIn();
    const renew = async (answer: 'lost' | 'given') => {
      const renewing = session.renew(session.token()).catch(() => undefined);
      await settled();
      const call = server.expectOne('/api/session/refresh');
      if (answer === 'lost') call.error(new ProgressEvent('error'));
      else call.flush(anAnswer({ accessToken: `token after ${session.token()}` }));
      await renewing;
      return call.request.headers.get('Idempotency-Key');
    };
    const first = await renew('lost');
    expect(first).toMatch(/^[0-9a-f-]{36}$/);
    expect(await renew('lost')).toBe(first);
    expect(await renew('given')).toBe(first);
    expect(await renew('given')).not.toBe(first);
  });

  it('repeats a call under the same Idempotency-Key', async () => {
    await signedIn();
    const api = TestBed.inject(Api);
    api.call('invitations.withdraw', { params: { invitationId: 'i1' } }).subscribe();
    const first = server.expectOne('/api/invitations/i1/withdraw');
    first.flush(ranOut, unauthorized);
    await settled();
    server.expectOne('/api/session/refresh').flush(anAnswer({ accessToken: 'token-2' }));
    await settled();
    const second = server.expectOne('/api/invitations/i1/withdraw');
    expect(first.request.headers.get('Idempotency-Key')).toMatch(/^[0-9a-f-]{36}$/);
    expect(second.request.headers.get('Idempotency-Key')).toBe(
      first.request.headers.get('Idempotency-Key'),
    );
    second.flush(null);
  });

  it('takes a wrong password for what it is, not for an ended session', async () => {
    await signedIn();
    const answer = firstValueFrom(
      TestBed.inject(Api).call('account.changePassword', {
        body: { current: 'wrong', password: 'laundry soap 2' },
      }),
    );
    server
      .expectOne('/api/account/password')
      .flush({ ...ranOut, type: '/problems/sign-in-refused' }, unauthorized);
    const problem = await answer.catch((error: unknown) => error);
    expect(isProblem(problem, 'sign-in-refused')).toBe(true);
    expect(session.signedIn()).toBe(true);
  });

  it('leaves nothing of an area on the device at sign-out', async () => {
    await signedIn();
    const wiped = jest.fn(() => Promise.resolve());
    TestBed.inject(LocalKeepings).add({
      wouldLose: () => Promise.resolve('4 acts have not been sent.'),
      wipe: wiped,
    });
    expect(await TestBed.inject(LocalKeepings).losses()).toEqual(['4 acts have not been sent.']);
    const out = session.signOut();
    server.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null);
    await out;
    expect(wiped).toHaveBeenCalled();
    expect(session.signedIn()).toBe(false);
    expect(session.ended()).toBe(0);
    expect(localStorage.length).toBe(0);
  });

  it('stays signed in when sign-out found no answer', async () => {
    await signedIn();
    const out = session.signOut();
    server.expectOne('/api/session').error(new ProgressEvent('error'));
    await expect(out).rejects.toThrow('no answer');
    expect(session.signedIn()).toBe(true);
  });

  it('goes on as another membership', async () => {
    await signedIn();
    const done = session.switchTo('m2');
    const call = server.expectOne('/api/session/membership');
    expect(call.request.body).toEqual({ membershipId: 'm2' });
    const other = anAnswer().memberships[1] ?? null;
    call.flush(anAnswer({ membership: other, shop: null }));
    await done;
    expect(session.role()).toBe('client_owner');
  });
});

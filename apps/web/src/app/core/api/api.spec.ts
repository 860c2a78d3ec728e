import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { firstValueFrom } from 'rxjs';
import { Api } from './api';
import { Intent } from './intent';
import { isProblem } from './problem';
import { requestOf } from './request-of';

describe('Api', () => {
  let api: Api;
  let server: HttpTestingController;

  beforeEach(() => {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), provideHttpClientTesting()],
    });
    api = TestBed.inject(Api);
    server = TestBed.inject(HttpTestingController);
  });

  afterEach(() => server.verify());

  it('fills in the path and sends the version in quotes', () => {
    api.call('account.change', { body: { name: 'Noor' }, ifMatch: 7 }).subscribe();
    const { request } = server.expectOne('/api/account');
    expect(request.method).toBe('PATCH');
    expect(request.headers.get('If-Match')).toBe('"7"');
    expect(request.body).toEqual({ name: 'Noor' });
  });

  it('escapes what goes into a path', () => {
    expect(requestOf('invitations.look', { params: { token: 'a/b?c' } }).url).toBe(
      '/api/invitations/a%2Fb%3Fc',
    );
  });

  it('refuses a path with a hole in it', () => {
    expect(() => requestOf('invitations.look', { params: {} })).toThrow('needs "token"');
  });

  it('leaves out of the query what is not set', () => {
    const { query } = requestOf('session.list', {
      query: { q: '', sort: 'name', cursor: undefined, state: ['up', 'down'] },
    });
    expect(query.toString()).toBe('sort=name&state=up&state=down');
  });

  it('gives the problem its name, words and fields', async () => {
    const answer = firstValueFrom(
      api.call('session.signIn', { body: { email: '', password: '' } }),
    );
    server.expectOne('/api/session').flush(
      {
        type: '/problems/invalid-request',
        title: 'Some values are not right',
        status: 422,
        errors: [{ pointer: '/email', detail: 'is not an address' }],
      },
      { status: 422, statusText: 'Unprocessable Content' },
    );
    const problem = await answer.catch((error: unknown) => error);
    expect(isProblem(problem, 'invalid-request')).toBe(true);
    expect(isProblem(problem) && problem.errors).toEqual([
      { pointer: '/email', detail: 'is not an address' },
    ]);
    expect(isProblem(problem) && problem.unanswered).toBe(false);
  });

  it('knows that no answer is not a refusal', async () => {
    const answer = firstValueFrom(api.call('session.list'));
    server.expectOne('/api/sessions').error(new ProgressEvent('error'));
    const problem = await answer.catch((error: unknown) => error);
    expect(isProblem(problem, 'no-answer') && problem.unanswered).toBe(true);
  });

  it('takes a page that is not of the API for no proper answer', async () => {
    const answer = firstValueFrom(api.call('session.list'));
    server
      .expectOne('/api/sessions')
      .flush('<html>bad gateway</html>', { status: 502, statusText: 'Bad Gateway' });
    const problem = await answer.catch((error: unknown) => error);
    expect(isProblem(problem, 'unavailable') && problem.unanswered).toBe(true);
  });

  it('reads file and name, and the problem where a file was expected', async () => {
    const file = firstValueFrom(api.file('session.list'));
    server.expectOne('/api/sessions').flush(new Blob(['a,b']), {
      headers: { 'Content-Disposition': 'attachment; filename="stores.csv"' },
    });
    expect((await file).name).toBe('stores.csv');

    const refused = firstValueFrom(api.file('session.list'));
    server
      .expectOne('/api/sessions')
      .flush(blobOf({ type: '/problems/not-found', title: 'There is nothing here' }), {
        status: 404,
        statusText: 'Not Found',
      });
    const problem = await refused.catch((error: unknown) => error);
    expect(isProblem(problem, 'not-found')).toBe(true);
  });
});

describe('Intent', () => {
  it('keeps its key until it is renewed', () => {
    const intent = new Intent();
    const first = intent.key;
    expect(intent.key).toBe(first);
    expect(first).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-7/);
    intent.renew();
    expect(intent.key).not.toBe(first);
  });
});

/** The test world's Blob cannot be read as text. */
function blobOf(document: object): Blob {
  const blob = new Blob([JSON.stringify(document)]);
  return Object.assign(blob, { text: () => Promise.resolve(JSON.stringify(document)) });
}

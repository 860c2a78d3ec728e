import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { Problem } from '../api/problem';
import { Messages } from './messages';
import { PageErrors } from './page-errors';

describe('Messages', () => {
  let messages: Messages;

  beforeEach(() => {
    jest.useFakeTimers();
    TestBed.configureTestingModule({
      providers: [provideRouter([{ path: '**', children: [] }]), PageErrors],
    });
    messages = TestBed.inject(Messages);
  });

  afterEach(() => jest.useRealTimers());

  async function go(url: string): Promise<void> {
    const gone = TestBed.inject(Router).navigateByUrl(url);
    await jest.advanceTimersByTimeAsync(1);
    await gone;
  }

  it('takes what is said on leaving along to the next page, and no further', async () => {
    messages.say('Visit 0412 was cancelled.');
    await go('/visits');
    expect(messages.message()?.text).toBe('Visit 0412 was cancelled.');
    jest.advanceTimersByTime(5_000);
    await go('/calls');
    expect(messages.message()).toBeUndefined();
  });

  it('does what it offers, once', () => {
    const undo = jest.fn();
    messages.say('Visit 0412 was cancelled.', { label: 'Undo', run: undo });
    messages.act();
    messages.act();
    expect(undo).toHaveBeenCalledTimes(1);
  });

  it('says an error nobody caught, in the words of the server if it has them', () => {
    const log = jest.spyOn(console, 'error').mockImplementation(() => undefined);
    const errors = TestBed.inject(PageErrors);
    errors.handleError(new TypeError('x is undefined'));
    expect(messages.message()?.text).toContain('Something went wrong on this page');
    errors.handleError({ rejection: new Problem('not-found', 404, 'There is nothing here') });
    expect(messages.message()?.text).toBe('There is nothing here');
    expect(log).toHaveBeenCalledTimes(2);
    log.mockRestore();
  });
});

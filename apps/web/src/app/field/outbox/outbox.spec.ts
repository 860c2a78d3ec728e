import 'fake-indexeddb/auto';
import { deserialize, serialize } from 'node:v8';
import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { of, throwError } from 'rxjs';
import { Api } from '../../core/api/api';
import { Problem } from '../../core/api/problem';
import { Messages } from '../../core/messages/messages';
import { LocalKeepings } from '../../core/session/leaving';
import { Session } from '../../core/session/session';
import { unsent } from '../../core/session/unsent';
import { FieldStore } from '../kept/field-store';
import { Outbox } from './outbox';
import { Sender } from './sender';

// jsdom has none, and the fake database copies what it keeps by it.
globalThis.structuredClone ??= (value: unknown) => deserialize(serialize(value)) as never;

const api = { call: jest.fn() };
const membership = signal<{ id: string } | undefined>(undefined);

function start(): Outbox {
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      { provide: Session, useValue: { membership } },
      { provide: Api, useValue: api },
    ],
  });
  return TestBed.inject(Outbox);
}

/** As after closing the browser: nothing is left but what the device keeps. */
async function restart(): Promise<Outbox> {
  TestBed.resetTestingModule();
  const outbox = start();
  TestBed.tick();
  await until(() => outbox.acts().length > 0);
  return outbox;
}

async function until(holds: () => boolean): Promise<void> {
  for (let n = 0; n < 200 && !holds(); n++) await new Promise((next) => setTimeout(next, 10));
  expect(holds()).toBe(true);
}

let people = 0;

describe('the outbox', () => {
  beforeEach(() => {
    api.call.mockReset();
    membership.set({ id: `membership-${++people}` });
  });
  afterEach(() => unsent.forget());

  it('keeps what was recorded over a restart, in the order it was made', async () => {
    const outbox = start();
    await outbox.record('visit', 'arrived', {});
    await outbox.record('visit', 'cause', { jobId: 'job', cause: 'wear' });
    await outbox.record('visit', 'action', { jobId: 'job', words: 'Belt fitted' });
    const again = await restart();
    expect(again.acts().map(({ act }) => act.kind)).toEqual(['arrived', 'cause', 'action']);
    expect(again.waiting()).toHaveLength(3);
    expect(unsent.count()).toBe(3);
  });

  it('keeps the order though the clock is put back', async () => {
    const outbox = start();
    await outbox.record('visit', 'arrived', {});
    const now = jest.spyOn(Date, 'now').mockReturnValue(1_000_000);
    await outbox.record('visit', 'left', {});
    now.mockRestore();
    const again = await restart();
    expect(again.acts().map(({ act }) => act.kind)).toEqual(['arrived', 'left']);
  });

  it('does not mix memberships', async () => {
    const outbox = start();
    await outbox.record('visit', 'arrived', {});
    membership.set({ id: `membership-${++people}` });
    TestBed.tick();
    await until(() => outbox.acts().length === 0);
    await outbox.record('other visit', 'left', {});
    expect(outbox.waiting().map(({ visitId }) => visitId)).toEqual(['other visit']);
    membership.set({ id: `membership-${people - 1}` });
    TestBed.tick();
    await until(() => outbox.acts()[0]?.visitId === 'visit');
    expect(unsent.count()).toBe(2);
  });

  it('says so when the device cannot keep an entry, and does not pretend', async () => {
    const outbox = start();
    const full = new Error('QuotaExceededError');
    jest.spyOn(TestBed.inject(FieldStore), 'database').mockRejectedValue(full);
    await expect(outbox.record('visit', 'arrived', {})).rejects.toBe(full);
    expect(outbox.acts()).toEqual([]);
    expect(TestBed.inject(Messages).message()?.text).toContain('could not keep your last entry');
  });

  it('lets only refused acts go, when the person says so', async () => {
    const outbox = start();
    await outbox.record('visit', 'arrived', {});
    await outbox.record('visit', 'left', {});
    const [first, second] = outbox.acts().map(({ id }) => id) as [string, string];
    await outbox.refuse([first], 'The visit is cancelled.');
    await outbox.discard([first, second]);
    expect(outbox.acts().map(({ id }) => id)).toEqual([second]);
    const again = await restart();
    expect(again.acts().map(({ id }) => id)).toEqual([second]);
  });

  it('is empty after sign-out', async () => {
    const outbox = start();
    await outbox.record('visit', 'arrived', {});
    const keepings = TestBed.inject(LocalKeepings);
    expect(await keepings.losses()).toEqual([
      '1 entry on this device has not been sent and would be lost.',
    ]);
    await keepings.wipe();
    await outbox.load();
    expect(await (await TestBed.inject(FieldStore).database()).count('acts')).toBe(0);
  });

  it('sends by itself, tries again after no answer, and shows since when', async () => {
    const outbox = start();
    const sender = TestBed.inject(Sender);
    api.call.mockReturnValueOnce(throwError(() => new Problem('no-answer', 0, 'No answer')));
    await outbox.record('visit', 'arrived', {});
    TestBed.tick();
    await until(() => sender.quietSince() !== undefined);
    expect(outbox.waiting()).toHaveLength(1);

    const id = outbox.acts()[0]?.id;
    api.call.mockReturnValue(of({ results: [{ id, outcome: 'stored', reason: null }] }));
    window.dispatchEvent(new Event('online'));
    await until(() => outbox.sent().length === 1);
    expect(sender.quietSince()).toBeUndefined();
    expect(unsent.count()).toBe(0);
    const ids = api.call.mock.calls.map(([, sent]) => sent.body.acts[0].id as string);
    expect(ids).toEqual([id, id]);
  });
});

import { HttpContext } from '@angular/common/http';
import { computed, effect, inject, Injectable, signal } from '@angular/core';
import { type BodyOf, type Permission } from '@lib/contracts/web';
import { Reading } from '@lib/ui/format/reading';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { Api } from '../api/api';
import { isProblem } from '../api/problem';
import { LocalKeepings } from './leaving';
import { oneAtATime } from './one-at-a-time';
import { type SessionAnswer, type ShopOfSession, type Snapshot, snapshots } from './snapshot';
import { tabs } from './tabs';
import { withoutSession } from './without-session';

const bare = () => new HttpContext().set(withoutSession, true);

/**
 * Who is signed in, as which membership, and what that allows. The access token lives in memory
 * only; a refresh token that scripts cannot see lives in a cookie.
 */
@Injectable({ providedIn: 'root' })
export class Session {
  readonly #api = inject(Api);
  readonly #keepings = inject(LocalKeepings);
  readonly #reading = inject(Reading);
  readonly #now = signal<Snapshot | undefined>(undefined);
  #token: string | undefined;
  /** Kept until the server has answered, which may have traded the cookie and been cut off. */
  #refreshKey: string | undefined;
  #started: Promise<void> | undefined;
  #renewing: Promise<string | undefined> | undefined;

  readonly person = computed(() => this.#now()?.person);
  readonly membership = computed(() => this.#now()?.membership ?? undefined);
  readonly memberships = computed(() => this.#now()?.memberships ?? []);
  readonly shop = computed(() => this.#now()?.shop ?? undefined);
  readonly role = computed(() => this.membership()?.role);
  readonly signedIn = computed(() => this.#now() !== undefined);
  readonly permissions = computed<ReadonlySet<Permission>>(
    () => new Set(this.#now()?.permissions ?? []),
  );
  /** The person signed out: nothing on the page needs keeping any more. */
  readonly signedOut = signal(false);
  /** Counts the sessions that ended without the person asking for it. */
  readonly ended = signal(0);

  constructor() {
    effect(() => {
      const shop = this.shop();
      this.#reading.locale.set(shop?.locale ?? navigator.language);
      this.#reading.currency.set(shop?.currency ?? 'USD');
      this.#reading.zone.set(shop?.zone ?? Intl.DateTimeFormat().resolvedOptions().timeZone);
    });
    tabs.onMessage((message) => {
      if (message === 'changed') location.reload();
      if (message === 'signed-out') this.#end();
    });
  }

  /** Picks up the session of an earlier visit, once; guards wait for it. */
  start(): Promise<void> {
    return (this.#started ??= this.#pickUp());
  }

  may(permission: Permission): boolean {
    return this.permissions().has(permission);
  }

  /** As `may`, for what changes something: not while the shop is paused. */
  mayChange(permission: Permission): boolean {
    return this.may(permission) && (this.shop()?.mayWrite ?? true);
  }

  token(): string | undefined {
    return this.#token;
  }

  async signIn(body: BodyOf<'session.signIn'>): Promise<void> {
    this.take(await firstValueFrom(this.#api.callWith(bare(), 'session.signIn', { body })));
    tabs.tell('changed');
  }

  /** Goes on with an answer that carries a session: after sign-in or an accepted invitation. */
  take(answer: SessionAnswer): void {
    this.#token = answer.accessToken;
    this.#now.set(snapshots.keep(answer));
    this.signedOut.set(false);
    this.#started = Promise.resolve();
  }

  async switchTo(membershipId: string): Promise<void> {
    this.take(await firstValueFrom(this.#api.call('session.switch', { body: { membershipId } })));
    tabs.tell('changed');
  }

  /** A token that works, in place of `stale`; undefined when the session has ended. */
  async renew(stale: string | undefined): Promise<string | undefined> {
    if (this.#token !== stale) return this.#token;
    this.#renewing ??= oneAtATime('tw.session', () => this.#refresh()).finally(
      () => (this.#renewing = undefined),
    );
    return this.#renewing;
  }

  async signOut(everywhere = false): Promise<void> {
    if (everywhere) await firstValueFrom(this.#api.call('session.signOutEverywhere'));
    else await firstValueFrom(this.#api.callWith(bare(), 'session.signOut'));
    await this.#keepings.wipe();
    this.signedOut.set(true);
    this.#forget();
    tabs.tell('signed-out');
  }

  /** After the person's own name changed. */
  rename(name: string): void {
    this.#now.update((now) => now && { ...now, person: { ...now.person, name } });
  }

  /** After the shop's name, currency, zone or way of writing changed. */
  restateShop(shop: Pick<ShopOfSession, 'name' | 'currency' | 'zone' | 'locale'>): void {
    const { name, currency, zone, locale } = shop;
    this.#now.update(
      (now) => now && { ...now, shop: now.shop && { ...now.shop, name, currency, zone, locale } },
    );
  }

  async #pickUp(): Promise<void> {
    const kept = snapshots.read();
    if (!kept) return;
    this.#now.set(kept);
    try {
      await this.renew(undefined);
    } catch {
      // No answer: go on with what was kept. The first call that is answered settles it.
    }
  }

  async #refresh(): Promise<string | undefined> {
    this.#refreshKey ??= v7();
    try {
      const key = this.#refreshKey;
      this.take(await firstValueFrom(this.#api.callWith(bare(), 'session.refresh', { key })));
      this.#refreshKey = undefined;
      return this.#token;
    } catch (error) {
      if (isProblem(error) && error.unanswered) throw error;
      this.#refreshKey = undefined;
      this.#end();
      return undefined;
    }
  }

  #end(): void {
    if (!this.signedIn()) return;
    this.#forget();
    this.ended.update((n) => n + 1);
  }

  #forget(): void {
    this.#token = undefined;
    this.#now.set(undefined);
    snapshots.forget();
  }
}

import { effect, inject, Injectable, signal, untracked } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { daysOn } from '../day/near-days';
import { Api } from '../../core/api/api';
import { type Problem, problemFrom } from '../../core/api/problem';
import { Session } from '../../core/session/session';
import { FieldStore } from '../kept/field-store';
import { type KeptDay, type KeptSheet, type Sheet } from '../kept/kept';
import { Outbox } from '../outbox/outbox';
import { projectSheet } from '../projection/project-sheet';

/** Days that are over are kept this long, for what could not be sent in time. */
const daysKept = 3;

/**
 * The tech's days and visits: what the device keeps at once, then what the server says, and over
 * both what was recorded here since.
 */
@Injectable({ providedIn: 'root' })
export class Sheets {
  readonly #api = inject(Api);
  readonly #store = inject(FieldStore);
  readonly #outbox = inject(Outbox);
  readonly #session = inject(Session);
  readonly #days = signal<ReadonlyMap<string, KeptDay>>(new Map());
  readonly #sheets = signal<ReadonlyMap<string, KeptSheet>>(new Map());

  constructor() {
    effect(() => {
      this.#store.membershipId();
      untracked(() => {
        this.#days.set(new Map());
        this.#sheets.set(new Map());
      });
    });
  }

  day(on: string): KeptDay | undefined {
    return this.#days().get(on);
  }

  /** The visit as the tech knows it; undefined while nothing is known. */
  sheet(visitId: string): Sheet | undefined {
    const kept = this.#sheets().get(visitId);
    if (!kept) return undefined;
    // What was answered for after the sheet was asked for may not be in it.
    const acts = this.#outbox
      .acts()
      .filter((act) => act.visitId === visitId)
      .filter(({ state, answeredAt }) => state !== 'sent' || (answeredAt ?? '') >= kept.askedAt);
    return projectSheet(
      kept.sheet,
      acts.map(({ act }) => act),
      this.#session.person()?.name ?? '',
    );
  }

  /** Opens a day; answers with what went wrong when the server could not be asked. */
  async openDay(on: string): Promise<Problem | undefined> {
    if (!this.#days().has(on)) await this.#readDay(on).catch(() => undefined);
    const askedAt = new Date().toISOString();
    try {
      const answer = await firstValueFrom(this.#api.call('visits.day', { query: { on } }));
      const sheets = answer.sheets.map((sheet) => ({ visitId: sheet.visit.id, askedAt, sheet }));
      const day = { on: answer.on, askedAt, visitIds: sheets.map(({ visitId }) => visitId) };
      this.#show([day], sheets);
      await this.#keep([day], sheets);
      return undefined;
    } catch (error) {
      return problemFrom(error);
    }
  }

  /** As `openDay`, for one visit. */
  async openVisit(visitId: string): Promise<Problem | undefined> {
    if (!this.#sheets().has(visitId)) await this.#readVisit(visitId).catch(() => undefined);
    const askedAt = new Date().toISOString();
    try {
      const sheet = await firstValueFrom(this.#api.call('visits.sheet', { params: { visitId } }));
      const kept = { visitId, askedAt, sheet };
      this.#show([], [kept]);
      await this.#keep([], [kept]);
      return undefined;
    } catch (error) {
      return problemFrom(error);
    }
  }

  async #readDay(on: string): Promise<void> {
    const database = await this.#store.database();
    const day = await database.get('days', on);
    if (!day) return;
    const sheets = await Promise.all(day.visitIds.map((id) => database.get('sheets', id)));
    this.#show(
      [day],
      sheets.filter((sheet) => sheet !== undefined),
    );
  }

  async #readVisit(visitId: string): Promise<void> {
    const kept = await (await this.#store.database()).get('sheets', visitId);
    if (kept) this.#show([], [kept]);
  }

  #show(days: readonly KeptDay[], sheets: readonly KeptSheet[]): void {
    this.#days.update((now) => new Map([...now, ...days.map((day) => [day.on, day] as const)]));
    this.#sheets.update(
      (now) => new Map([...now, ...sheets.map((sheet) => [sheet.visitId, sheet] as const)]),
    );
  }

  /** A device without room still shows what it was told; it only cannot open it off line. */
  async #keep(days: readonly KeptDay[], sheets: readonly KeptSheet[]): Promise<void> {
    try {
      const database = await this.#store.database();
      await database.put('sheets', sheets);
      await database.put('days', days);
      await this.#clearOut();
    } catch {
      return;
    }
  }

  async #clearOut(): Promise<void> {
    const database = await this.#store.database();
    const oldest = daysOn(new Date().toISOString().slice(0, 10), -daysKept);
    const unsent = this.#outbox.acts().filter(({ state }) => state !== 'sent');
    const days = (await database.all('days')).filter(({ on }) => on < oldest);
    const sheets = (await database.all('sheets')).filter(
      ({ visitId, sheet }) =>
        sheet.visit.plannedOn < oldest && !unsent.some((act) => act.visitId === visitId),
    );
    await database.remove(
      'days',
      days.map(({ on }) => on),
    );
    await database.remove(
      'sheets',
      sheets.map(({ visitId }) => visitId),
    );
  }
}

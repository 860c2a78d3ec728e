import { computed, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { auditTime } from 'rxjs';
import { v7 } from 'uuid';
import { type Problem } from '../../core/api/problem';
import { Live } from '../../core/live/live';
import { type SheetCall } from '../kept/kept';
import { type ActKind, type LocalAct, type PayloadOf } from '../outbox/local-act';
import { Outbox } from '../outbox/outbox';
import { Sheets } from './sheets';

/** The visit whose pages are open: what is known of it, and the way to record on it. */
@Injectable()
export class FieldVisit {
  readonly #sheets = inject(Sheets);
  readonly #outbox = inject(Outbox);
  readonly #id = signal('');

  readonly problem = signal<Problem | undefined>(undefined);
  readonly sheet = computed(() => this.#sheets.sheet(this.#id()));
  /** Entries of this visit that the server did not take. */
  readonly refused = computed<readonly LocalAct[]>(() =>
    this.#outbox.refused().filter(({ visitId }) => visitId === this.#id()),
  );
  readonly ended = computed(() => {
    const state = this.sheet()?.visit.state;
    return state === 'completed' || state === 'cancelled';
  });
  /** The ticket is signed off: the server takes nothing more. */
  readonly closed = computed(
    () => this.sheet()?.visit.state === 'cancelled' || !!this.sheet()?.visit.ticket,
  );

  constructor() {
    // What others change meanwhile, and what the server made of what was sent from here.
    inject(Live)
      .of('visit', 'call', 'conditions')
      .pipe(auditTime(1_000), takeUntilDestroyed())
      .subscribe(() => void this.reload());
  }

  get id(): string {
    return this.#id();
  }

  async open(visitId: string): Promise<void> {
    this.#id.set(visitId);
    await this.reload();
  }

  async reload(): Promise<void> {
    const visitId = this.#id();
    if (!visitId) return;
    const problem = await this.#sheets.openVisit(visitId);
    if (visitId === this.#id()) this.problem.set(problem);
  }

  async record<K extends ActKind>(kind: K, payload: PayloadOf<K>): Promise<void> {
    await this.#outbox.record(this.#id(), kind, payload);
  }

  /** Whoever works on a machine has arrived, also when they did not say so. */
  async arrive(): Promise<void> {
    if (!this.sheet()?.visit.arrivedAt) await this.record('arrived', {});
  }

  /** Opens a job on a machine, or finds the one that is open; answers with its id. */
  async openJob(machineId: string, call?: SheetCall): Promise<string> {
    const open = this.sheet()?.jobs.find(({ machine }) => machine.id === machineId);
    if (open) return open.id;
    const jobId = v7();
    await this.arrive();
    await this.record('job_opened', {
      jobId,
      machineId,
      callId: call?.id ?? null,
      symptom: call?.symptom ?? null,
    });
    return jobId;
  }
}

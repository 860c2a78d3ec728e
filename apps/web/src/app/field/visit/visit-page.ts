import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  Callout,
  clockText,
  conditionWords,
  FloorPlan,
  PageHead,
  ProblemNote,
  Reading,
  WordPipe,
} from '@lib/ui';
import { type Sheet, type SheetCall, type SheetMachine } from '../kept/kept';
import { OutboxLine } from '../outbox/outbox-line';
import { FieldVisit } from '../sheets/field-visit';
import { CallNote } from './call-note';
import { JobTicket } from './job-ticket';
import { NothingFound } from './nothing-found';
import { sheetFloor } from './sheet-floor';

/** A visit on the spot: what changes the work first, then the floor, then the work. */
@Component({
  selector: 'tw-visit-page',
  imports: [
    Callout,
    CallNote,
    FloorPlan,
    JobTicket,
    MatButton,
    NothingFound,
    OutboxLine,
    PageHead,
    ProblemNote,
    RouterLink,
    WordPipe,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-page.html',
  styleUrl: './visit-page.scss',
})
export class VisitPage {
  readonly #router = inject(Router);
  readonly #reading = inject(Reading);
  protected readonly visit = inject(FieldVisit);
  protected readonly panel = viewChild<ElementRef<HTMLElement>>('panel');
  protected readonly floorHead = viewChild<ElementRef<HTMLElement>>('floorHead');

  protected readonly conditions = computed(
    () => this.visit.sheet()?.conditions.map(conditionWords) ?? [],
  );
  protected readonly sub = computed(() => {
    const visit = this.visit.sheet()?.visit;
    if (!visit) return '';
    const clock = (at: string) => clockText(at, this.#reading.locale(), this.#reading.zone());
    const { window } = visit;
    const when = window ? `${clock(window.from)} to ${clock(window.until)}` : 'Any time';
    return `${when}, ${visit.store.address}`;
  });
  protected readonly floor = computed(() => {
    const sheet = this.visit.sheet();
    return sheet ? sheetFloor(sheet) : [];
  });
  protected readonly openItems = computed(
    () => this.visit.sheet()?.openItems.filter(({ doneAt }) => doneAt === null) ?? [],
  );
  /** Calls without a job yet. */
  protected readonly calls = computed(() => {
    const sheet = this.visit.sheet();
    return (sheet?.calls ?? []).filter(
      (call) =>
        !sheet?.jobs.some(
          ({ callId, machine }) => callId === call.id || machine.id === call.machine?.id,
        ),
    );
  });

  /** The machine that was touched on the floor. */
  protected readonly chosen = signal<readonly string[]>([]);
  /** A call whose machine is being picked. */
  protected readonly picking = signal<SheetCall | undefined>(undefined);
  protected readonly testing = signal<string | undefined>(undefined);

  protected readonly machine = computed<SheetMachine | undefined>(() =>
    this.visit.sheet()?.machines.find(({ id }) => id === this.chosen()[0]),
  );
  protected readonly jobOfMachine = computed(() =>
    this.visit.sheet()?.jobs.find(({ machine }) => machine.id === this.machine()?.id),
  );
  protected readonly callOfMachine = computed(
    () => this.picking() ?? this.calls().find((call) => call.machine?.id === this.machine()?.id),
  );

  constructor() {
    // A floor is taller than a phone: what was touched must not be offered out of sight.
    effect(() => this.panel()?.nativeElement.scrollIntoView({ block: 'nearest' }));
  }

  protected itemWords({ machine, words }: Sheet['openItems'][number]): string {
    return machine && !words.startsWith(machine.bay) ? `${machine.bay}: ${words}` : words;
  }

  protected machineOf(call: SheetCall): SheetMachine | undefined {
    return this.visit.sheet()?.machines.find(({ id }) => id === call.machine?.id);
  }

  protected async begin(machineId: string, call?: SheetCall): Promise<void> {
    const jobId = await this.visit.openJob(machineId, call);
    await this.#router.navigate(['/field/visits', this.visit.id, 'jobs', jobId]);
  }

  protected async beginCall(call: SheetCall): Promise<void> {
    if (call.machine) {
      await this.begin(call.machine.id, call);
      return;
    }
    this.picking.set(call);
    this.toFloor();
  }

  protected toFloor(): void {
    const head = this.floorHead()?.nativeElement;
    head?.scrollIntoView({ block: 'start' });
    head?.focus();
  }

  protected tested(): void {
    this.testing.set(undefined);
    this.chosen.set([]);
    this.picking.set(undefined);
  }

  protected async itemDone(openItemId: string): Promise<void> {
    await this.visit.record('open_item_done', { openItemId });
  }
}

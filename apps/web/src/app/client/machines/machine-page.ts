import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { missedTakings } from '@lib/domain/downtime/takings';
import { MoneyText } from '@lib/ui/format/money-text';
import { DayPipe, InstantPipe } from '@lib/ui/format/time-pipes';
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { MachineGlyph } from '@lib/ui/machine-glyph/machine-glyph';
import { StateMark } from '@lib/ui/machine-glyph/state-mark';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { counted, LabelPipe, labelFor, WordPipe } from '@lib/ui/words/words';
import { RowsExport } from '../../core/lists/rows-export';
import { reloadOn } from '../../core/live/reload-on';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { symptomText } from '../calls/call-words';
import { NearDayPipe, NearInstantPipe } from '../near-day';
import { lengthText, outagesOf } from './downtime';
import { type CallItem, type HistoryItem, type Machine, MachinesApi } from './machines-api';

/** One machine: does it earn, what was done to it, and how long its owner waited. */
@Component({
  selector: 'tw-machine-page',
  imports: [
    DayPipe,
    InstantPipe,
    LabelPipe,
    ListShell,
    LoadNote,
    MachineGlyph,
    MatButton,
    MoneyText,
    NearDayPipe,
    NearInstantPipe,
    PageHead,
    RouterLink,
    SectionHead,
    StateMark,
    TicketCard,
    WordPipe,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './machine-page.html',
  styles: `
    p {
      margin: 0 0 0.5rem;
      overflow-wrap: anywhere;
    }
    p:last-child {
      margin: 0;
    }
    .glyph {
      --tw-glyph: 3.5rem;
    }
    .state {
      font-weight: 600;
    }
    .state span {
      font-weight: 400;
    }
    .tw-stretched {
      color: var(--tw-ink);
      font-weight: 600;
      text-decoration: none;
    }
    .tw-stretched:hover {
      text-decoration: underline;
    }
  `,
})
export class MachinePage {
  readonly #api = inject(MachinesApi);
  readonly #exports = inject(RowsExport);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly length = lengthText;

  readonly machineId = input.required<string>();

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly history = listState((ask) => this.#api.history(this.machineId(), ask), {
    sorts: { '-on': 'Newest' },
  });
  readonly #calls = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.#api.calls(params),
  });
  readonly #allCalls = computed(() => (this.#calls.hasValue() ? this.#calls.value().items : []));
  protected readonly liveCalls = computed(() =>
    this.#allCalls().filter(({ state }) => state === 'open' || state === 'planned'),
  );
  protected readonly outages = computed(() => outagesOf(this.#allCalls()));
  protected readonly seesMoney = computed(() => this.session.may('statements.read'));
  protected readonly missed = computed(() => {
    if (!this.machine.hasValue()) return 0;
    const { state, stateSince, takingsADay } = this.machine.value();
    if (state !== 'down' && state !== 'locked_out') return 0;
    return missedTakings(takingsADay ?? 0, new Date(stateSince), new Date());
  });

  constructor() {
    reloadOn(this.machine, 'machines', 'conditions');
    reloadOn(this.history, 'visit', 'files');
    reloadOn(this.#calls, 'call', 'visit');
    effect(() => {
      if (!this.machine.hasValue()) return;
      const { bay, store } = this.machine.value();
      this.#titles.name(`${bay}, ${store.name}`);
    });
  }

  protected sub({ kind, make, model }: Machine): string {
    return [labelFor(kind), [make, model].filter(Boolean).join(' ')].filter(Boolean).join(' · ');
  }

  protected symptom(call: CallItem): string {
    return labelFor(symptomText(call));
  }

  protected more({ parts, photos }: HistoryItem): string {
    const fitted = parts.map(({ description }) => description).join(', ');
    const shown = photos > 0 ? counted(photos, 'picture') : '';
    return [fitted && `Fitted: ${fitted}.`, shown && `${shown}.`].filter(Boolean).join(' ');
  }

  protected save({ bay, store }: Machine): void {
    void this.#exports.save({
      name: `${store.name}-${bay}`,
      one: 'job',
      columns: [
        { head: 'Day', text: ({ on }) => on },
        { head: 'Found', text: ({ finding }) => finding },
        { head: 'Cause', text: ({ cause }) => cause },
        { head: 'Done', text: ({ action }) => action },
        { head: 'Result', text: ({ result }) => result },
        {
          head: 'Parts',
          text: (job: HistoryItem) => job.parts.map(({ description }) => description).join(', '),
        },
      ],
      page: (asked) => this.#api.history(this.machineId(), { ...this.history.ask(), ...asked }),
    });
  }
}

import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Callout, ClockPipe, counted, EmptyNote, PageHead, problemText } from '@lib/ui';
import { Confirm } from '../../core/confirm/confirm';
import { Sheets } from '../sheets/sheets';
import { actTitle } from './act-title';
import { type LocalAct } from './local-act';
import { Outbox } from './outbox';
import { Sender } from './sender';

interface Entry {
  readonly act: LocalAct;
  readonly title: string;
  readonly store: string;
}

/** Every entry of this device and what became of it; the place to see to what was refused. */
@Component({
  selector: 'tw-outbox-page',
  imports: [Callout, ClockPipe, EmptyNote, MatButton, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './outbox-page.html',
  styleUrl: './outbox-page.scss',
})
export class OutboxPage {
  readonly #outbox = inject(Outbox);
  readonly #sheets = inject(Sheets);
  readonly #sender = inject(Sender);
  readonly #confirm = inject(Confirm);

  protected readonly refused = computed(() => this.#entries(this.#outbox.refused()));
  protected readonly waiting = computed(() => this.#entries(this.#outbox.waiting()));
  protected readonly sent = computed(() => this.#entries([...this.#outbox.sent()].reverse()));
  protected readonly sentShown = signal(false);
  protected readonly heldUpBy = computed(() => {
    const problem = this.#sender.heldUpBy();
    return problem && problemText(problem);
  });
  protected readonly counted = counted;

  protected sendNow(): void {
    this.#sender.sendNow();
  }

  protected async tryAgain(entries: readonly Entry[]): Promise<void> {
    await this.#outbox.tryAgain(entries.map(({ act }) => act.id));
  }

  protected async discard(entries: readonly Entry[]): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: entries.length === 1 ? 'Let this entry go?' : 'Let these entries go?',
      consequence: `${counted(entries.length, 'entry', 'entries')} that the shop does not have will be gone for good: ${entries
        .map(({ title }) => title)
        .join('; ')}.`,
      action: 'Let go',
      stay: 'Keep',
      destructive: true,
    });
    if (agreed) await this.#outbox.discard(entries.map(({ act }) => act.id));
  }

  #entries(acts: readonly LocalAct[]): Entry[] {
    return acts.map((act) => {
      const sheet = this.#sheets.sheet(act.visitId);
      return {
        act,
        title: actTitle(act.act, sheet),
        store: sheet?.visit.store.name ?? '',
      };
    });
  }
}

import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { deliveryStates } from '@lib/contracts/generated/values';
import { type DeliveryState } from '@lib/contracts/web';
import {
  ChoiceFilter,
  choicesOf,
  InstantPipe,
  instantText,
  labelFor,
  LabelPipe,
  ListShell,
  listState,
  PageHead,
  problemText,
  Reading,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { type Mail, PlatformApi } from '../platform-api';

/** The platform's own mails. Where the answer got lost, only a person may say what became of one. */
@Component({
  selector: 'tw-platform-mail-list',
  imports: [ChoiceFilter, InstantPipe, LabelPipe, ListShell, MatButton, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './mail-list.html',
  styles: `
    .error {
      display: block;
      font-size: 0.875rem;
      overflow-wrap: anywhere;
    }
  `,
})
export class MailList {
  readonly #api = inject(PlatformApi);
  readonly #confirm = inject(Confirm);
  readonly #exports = inject(RowsExport);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  protected readonly session = inject(Session);

  protected readonly states = choicesOf(deliveryStates);
  protected readonly mails = listState((ask) => this.#api.mails(ask), {
    sorts: { '-createdAt': 'Newest' },
    filters: filtersFromAddress({ state: '' as '' | DeliveryState }),
  });

  constructor() {
    keepInAddress(this.mails);
  }

  protected narrow(state: string): void {
    this.mails.filterBy('state', state as '' | DeliveryState);
  }

  protected decidable({ state }: Mail): boolean {
    return state === 'uncertain' || state === 'failed';
  }

  protected standing({ state, sentAt, attempt }: Mail): string {
    if (sentAt) return `Sent ${instantText(sentAt, this.#reading.locale(), this.#reading.zone())}`;
    if (state === 'uncertain') return 'Uncertain: handed over, but the answer got lost';
    return `${labelFor(state)}${attempt > 1 ? `, tried ${attempt} times` : ''}`;
  }

  protected async decide(mail: Mail, decision: 'arrived' | 'send_again'): Promise<void> {
    if (decision === 'send_again' && mail.state === 'uncertain') {
      const agreed = await this.#confirm.ask({
        heading: 'Send this mail again?',
        consequence: `If it did arrive, ${mail.recipient} gets it twice.`,
        action: 'Send it again',
      });
      if (!agreed) return;
    }
    try {
      await firstValueFrom(this.#api.decideMail(mail.id, decision));
      this.#messages.say(
        decision === 'arrived'
          ? `The mail to ${mail.recipient} counts as sent.`
          : `The mail to ${mail.recipient} goes out again.`,
      );
    } catch (problem) {
      this.#messages.say(problemText(problem));
    }
    this.mails.reload();
  }

  protected save(): void {
    void this.#exports.save<Mail>({
      name: 'platform-mails',
      one: 'mail',
      columns: [
        { head: 'To', text: ({ recipient }) => recipient },
        { head: 'Mail', text: ({ template }) => template },
        { head: 'Made', text: ({ createdAt }) => createdAt },
        { head: 'State', text: ({ state }) => state },
        { head: 'Sent', text: ({ sentAt }) => sentAt },
        { head: 'Attempts', text: ({ attempt }) => attempt },
        { head: 'Problem', text: ({ lastError }) => lastError },
      ],
      page: (asked) => this.#api.mails({ ...this.mails.ask(), ...asked }),
    });
  }
}

import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { type Decision, DeliveriesApi, type Delivery } from './deliveries-api';

/** A person's word on a mail that went wrong: it is never sent again without one. */
@Component({
  selector: 'tw-delivery-decision',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (session.mayChange('deliveries.decide')) {
      @if (delivery().state === 'uncertain') {
        <button matButton type="button" [disabled]="busy()" (click)="decide('arrived')">
          It arrived<span class="tw-unseen"> at {{ delivery().recipient }}</span>
        </button>
      }
      <button matButton type="button" [disabled]="busy()" (click)="decide('send_again')">
        Send again<span class="tw-unseen"> to {{ delivery().recipient }}</span>
      </button>
    }
  `,
})
export class DeliveryDecision {
  readonly #api = inject(DeliveriesApi);
  readonly #messages = inject(Messages);
  protected readonly session = inject(Session);

  readonly delivery = input.required<Delivery>();
  readonly decided = output<Delivery>();

  protected readonly busy = signal(false);

  protected async decide(decision: Decision): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      const decided = await firstValueFrom(this.#api.decide(this.delivery(), decision));
      this.#messages.say(
        decision === 'arrived'
          ? `The mail to ${decided.recipient} is noted as arrived.`
          : `The mail to ${decided.recipient} is on its way again.`,
      );
      this.decided.emit(decided);
    } catch (problem) {
      this.#messages.say(problemText(problem));
      this.decided.emit(this.delivery());
    } finally {
      this.busy.set(false);
    }
  }
}

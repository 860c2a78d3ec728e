import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText } from '@lib/ui/notes/problem-text';
import { firstValueFrom } from 'rxjs';
import { CardPage } from './card-page';
import { type Payable, PaymentsApi } from './payments-api';

/** Leads to the page where the card is entered; afterwards the browser comes back to the payment. */
@Component({
  selector: 'tw-pay-button',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button
      matButton="filled"
      type="button"
      [attr.aria-label]="label()"
      [disabled]="busy()"
      disabledInteractive
      (click)="pay()"
    >
      {{ busy() ? 'Opening the card page' : 'Pay' }}
    </button>
    <span role="alert">{{ problem() }}</span>
  `,
  styles: `
    :host {
      position: relative;
      display: block;
      // Above a ticket that is a link as a whole.
      z-index: 1;
    }
    span:not(:empty) {
      display: block;
      margin-block-start: 0.5rem;
      color: var(--tw-alarm);
    }
  `,
})
export class PayButton {
  readonly #api = inject(PaymentsApi);
  readonly #cardPage = inject(CardPage);

  readonly payable = input.required<Payable>();
  /** Says to who cannot see what stands beside it what is paid: "Pay $381.40 for Foxglove Lane". */
  readonly label = input.required<string>();

  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected async pay(): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      const { url } = await firstValueFrom(this.#api.startCard(this.payable()));
      this.#cardPage.open(url);
    } catch (problem) {
      this.problem.set(problemText(problem));
      this.busy.set(false);
    }
  }
}

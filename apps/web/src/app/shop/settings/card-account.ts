import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { LoadNote, problemText, SectionHead } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { SettingsApi } from './settings-api';

/** Whether clients can pay statements by card, and the way to make it so. */
@Component({
  selector: 'tw-card-account',
  imports: [LoadNote, MatButton, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Card payments" />
    @if (connection.hasValue()) {
      @if (connection.value().connected) {
        <p>
          Clients can pay their statements by card. The money goes to your account
          <span class="tw-figures account">{{ connection.value().account }}</span>.
        </p>
      } @else {
        <p>
          Clients cannot pay by card yet. Connected to the card payment service, every statement
          carries a way to pay it at once.
        </p>
        @if (mayChange()) {
          <button
            matButton="filled"
            type="button"
            [disabled]="busy()"
            disabledInteractive
            (click)="connect()"
          >
            {{ busy() ? 'Connecting' : 'Take cards' }}
          </button>
        }
      }
      <p class="alarm" role="alert">{{ problem() }}</p>
    } @else {
      <tw-load-note [of]="connection" />
    }
  `,
  styles: `
    .alarm {
      color: var(--tw-alarm);
    }
    .account {
      overflow-wrap: anywhere;
    }
  `,
})
export class CardAccount {
  readonly #api = inject(SettingsApi);
  readonly #messages = inject(Messages);
  readonly #session = inject(Session);

  protected readonly connection = rxResource({ stream: () => this.#api.cardAccount() });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected mayChange(): boolean {
    return this.#session.mayChange('settings.change');
  }

  protected async connect(): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    try {
      this.connection.set(await firstValueFrom(this.#api.connectCards()));
      this.#messages.say('Clients can pay by card from now on.');
    } catch (problem) {
      this.problem.set(problemText(problem));
    } finally {
      this.busy.set(false);
    }
  }
}

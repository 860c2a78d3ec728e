import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { InstantPipe, labelFor, problemText, wordFor } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Intent } from '../../core/api/intent';
import { isProblem } from '../../core/api/problem';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { BearerFigures } from './bearer-figures';
import { OverruleForm } from './overrule-form';
import { type RulingGroup } from './ruling-groups';
import { type Rulings, RulingsApi } from './rulings-api';

/** One decision: the reasons in the order they were weighed, beside the figures of each bearer. */
@Component({
  selector: 'tw-ruling-card',
  imports: [BearerFigures, InstantPipe, MatButton, OverruleForm],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ruling-card.html',
  styleUrl: './ruling-card.scss',
})
export class RulingCard {
  readonly #api = inject(RulingsApi);
  readonly #messages = inject(Messages);
  protected readonly session = inject(Session);

  readonly rulings = input.required<Rulings>();
  readonly group = input.required<RulingGroup>();
  /** "3 of 5 to decide" */
  readonly progress = input('');
  readonly decided = output<Rulings>();
  readonly outdated = output<void>();

  readonly #intent = new Intent();
  protected readonly busy = signal(false);
  protected readonly overruling = signal(false);

  protected readonly heading = computed(() => {
    const { machine, category, symptom, finding } = this.group().job;
    const what = category ?? (symptom ? wordFor(symptom) : finding);
    return what ? `${machine.bay}: ${what}` : machine.bay;
  });
  protected readonly job = computed(() => {
    const { finding, action, cause } = this.group().job;
    const causeText = cause ? `Cause: ${wordFor(cause)}` : '';
    return [finding, action, causeText].filter(Boolean).join('. ');
  });
  protected readonly closed = computed(() => this.rulings().visit.ticketId !== null);
  protected readonly mayDecide = computed(
    () => !this.closed() && this.session.mayChange('rulings.decide'),
  );
  protected readonly confirmLabel = computed(() => {
    const bearer = this.group().proposed;
    return bearer === 'goodwill' ? 'Give it as goodwill' : `${labelFor(bearer)} bears it`;
  });
  protected readonly labelFor = labelFor;

  protected async confirm(): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    const { visit } = this.rulings();
    const waiting = this.group().lines.filter((line) => line.waiting);
    const lines = waiting.map(({ lineKey, basis }) => ({ lineKey, basis }));
    try {
      const call = this.#api.confirm(visit.id, { lines }, this.#intent.key);
      const rulings = await firstValueFrom(call);
      this.#intent.renew();
      this.decided.emit(rulings);
    } catch (problem) {
      this.#messages.say(problemText(problem));
      if (isProblem(problem) && !problem.unanswered) this.#intent.renew();
      if (isProblem(problem, 'conflict')) this.outdated.emit();
    } finally {
      this.busy.set(false);
    }
  }

  protected overruled(rulings: Rulings): void {
    this.overruling.set(false);
    this.decided.emit(rulings);
  }
}

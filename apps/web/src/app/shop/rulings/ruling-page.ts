import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  BearerLabel,
  counted,
  dayText,
  LoadNote,
  MoneyText,
  PageHead,
  Reading,
  wordFor,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { moneySign } from '../money/money-sign';
import { RulingCard } from './ruling-card';
import { nextToDecide, progressWords, type RulingGroup, rulingGroups } from './ruling-groups';
import { type Rulings, RulingsApi } from './rulings-api';

/** Who bears the lines of a visit: one decision after the other, then the next visit. */
@Component({
  selector: 'tw-ruling-page',
  imports: [BearerLabel, LoadNote, MatButton, MoneyText, PageHead, RouterLink, RulingCard],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './ruling-page.html',
  styleUrl: './ruling-page.scss',
})
export class RulingPage implements HasChanges {
  readonly #api = inject(RulingsApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly sign = moneySign();

  readonly visitId = input.required<string>();
  protected readonly rulings = rxResource({
    params: () => this.visitId(),
    stream: ({ params }) => this.#api.show(params),
  });
  /** The next visit with something to decide, asked for anew whenever something was decided. */
  protected readonly others = rxResource({
    params: () => (this.rulings.hasValue() ? this.rulings.value().waiting : undefined),
    stream: () => this.#api.waiting({ limit: 2 }),
  });
  protected readonly groups = computed(() =>
    this.rulings.hasValue() ? rulingGroups(this.rulings.value().jobs) : [],
  );
  /** Which group is looked at: the chosen one, else the next to decide, else the first. */
  readonly #chosen = linkedSignal<string, string | undefined>({
    source: () => this.visitId(),
    computation: () => undefined,
  });
  protected readonly shown = computed(
    () =>
      this.groups().find(({ key }) => key === this.#chosen()) ??
      nextToDecide(this.groups()) ??
      this.groups()[0],
  );
  protected readonly progress = computed(() => {
    const group = this.shown();
    return group ? progressWords(this.groups(), group) : '';
  });
  protected readonly next = computed(() =>
    this.others.hasValue()
      ? this.others.value().items.find(({ visitId }) => visitId !== this.visitId())
      : undefined,
  );
  protected readonly counted = counted;

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.rulings, 'ruling', 'visit', 'ticket');
    effect(() => {
      if (this.rulings.hasValue()) {
        this.#titles.name(`Ruling on visit ${this.rulings.value().visit.number}`);
      }
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected heading({ visit }: Rulings): string {
    return `Visit ${visit.number}: ${visit.store.name}`;
  }

  protected sub({ visit }: Rulings): string {
    const day = dayText(visit.on, this.#reading.locale());
    return [day, visit.tech, visit.client.name].filter(Boolean).join(', ');
  }

  protected look(group: RulingGroup): void {
    this.#chosen.set(group.key);
  }

  protected workOf({ job }: RulingGroup): string {
    return job.category ?? job.finding ?? (job.symptom ? wordFor(job.symptom) : '');
  }

  protected chargedOf(group: RulingGroup): number {
    return group.lines.reduce((sum, line) => sum + (line.bearer === 'store' ? line.list : 0), 0);
  }

  protected decided(rulings: Rulings): void {
    this.rulings.set(rulings);
    this.#chosen.set(undefined);
    this.#messages.say(
      rulings.waiting
        ? `Decided. ${counted(rulings.waiting, 'line')} of this visit left.`
        : `Decided. Everything on visit ${rulings.visit.number} is settled.`,
    );
  }
}

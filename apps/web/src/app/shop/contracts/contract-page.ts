import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { contractName } from '@lib/domain/words/document-name';
import {
  counted,
  DayPipe,
  dayText,
  LoadNote,
  MoneyText,
  PageHead,
  Reading,
  SectionHead,
  timeText,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { moneySign } from '../money/money-sign';
import { type Contract, ContractsApi } from './contracts-api';
import { coverageWords } from './coverage-words';
import { EndContract } from './end-contract';
import { NextRounds } from './next-rounds';
import { RoundTable } from './round-table';

/** One maintenance contract: when rounds come, what it pays for, and for which fee. */
@Component({
  selector: 'tw-contract-page',
  imports: [
    DayPipe,
    EndContract,
    LoadNote,
    MatButton,
    MoneyText,
    NextRounds,
    PageHead,
    RoundTable,
    RouterLink,
    SectionHead,
  ],
  providers: [OpenForms],
  templateUrl: './contract-page.html',
  styles: `
    h2 {
      margin-block: 0 0.5rem;
    }
    .tw-pair {
      margin-block-end: 1.5rem;
    }
    .fees {
      max-inline-size: 36rem;
      margin-block-end: 0.5rem;
    }
    tw-end-contract {
      display: block;
      margin-block-end: 1.5rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ContractPage implements HasChanges {
  readonly #api = inject(ContractsApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly contractId = input.required<string>();

  protected readonly contract = rxResource({
    params: () => this.contractId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly ending = signal(false);
  protected readonly sign = moneySign();
  protected readonly counted = counted;
  protected readonly contractName = contractName;
  protected readonly coverageWords = coverageWords;
  protected readonly ruleSentence = computed(() => {
    if (!this.contract.hasValue()) return '';
    const { ruleWords, shift } = this.contract.value();
    const closed = {
      next: 'A round that falls on a closed day comes on the next open one.',
      previous: 'A round that falls on a closed day comes on the open one before.',
      none: 'Rounds come on closed days too.',
    };
    return `${ruleWords.charAt(0).toUpperCase()}${ruleWords.slice(1)}. ${closed[shift]}`;
  });
  protected readonly startTime = computed(() =>
    this.contract.hasValue()
      ? timeText(this.contract.value().startTime, this.#reading.locale())
      : '',
  );
  protected readonly stateWords = computed(() => {
    if (!this.contract.hasValue()) return '';
    const { state, startsOn, endsOn } = this.contract.value();
    if (state === 'coming') return `runs from ${dayText(startsOn, this.#reading.locale())}`;
    if (state === 'ended' && endsOn) return `ended ${dayText(endsOn, this.#reading.locale())}`;
    return state;
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.contract, 'contract', 'visit');
    effect(() => {
      if (this.contract.hasValue()) this.#titles.name(this.contract.value().name);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected ended(contract: Contract): void {
    this.ending.set(false);
    this.contract.set(contract);
    this.#messages.say(
      `${contract.name} ends on ${dayText(contract.endsOn ?? '', this.#reading.locale())}. ` +
        'Rounds planned after that day were cancelled.',
    );
  }
}

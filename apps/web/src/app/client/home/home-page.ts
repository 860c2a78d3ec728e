import { NgTemplateOutlet } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { PageHead } from '@lib/ui/head/page-head';
import { EmptyNote } from '@lib/ui/notes/empty-note';
import { LoadNote } from '@lib/ui/notes/load-note';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { earningOf } from '../floors/earning';
import { StoreFloor } from '../floors/store-floor';
import { HomeApi } from './home-api';
import { LastVisits } from './last-visits';
import { NextStep } from './next-step';
import { nextSteps, standingStill } from './next-steps';
import { Owed } from './owed';
import { StillList } from './still-list';

const stepsAtFirst = 3;

/** Is my store earning, what happens next, what do I owe; then the proof. */
@Component({
  selector: 'tw-home-page',
  imports: [
    EmptyNote,
    LastVisits,
    LoadNote,
    MatButton,
    NextStep,
    NgTemplateOutlet,
    Owed,
    PageHead,
    RouterLink,
    StillList,
    StoreFloor,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './home-page.html',
  styleUrl: './home-page.scss',
})
export class HomePage {
  readonly #api = inject(HomeApi);
  protected readonly session = inject(Session);

  protected readonly facts = rxResource({ stream: () => this.#api.facts() });
  protected readonly all = signal(false);

  protected readonly stores = computed(() =>
    this.facts.hasValue() ? this.facts.value().stores : [],
  );
  protected readonly name = computed(() => {
    const only = this.stores().length === 1 ? this.stores()[0] : undefined;
    return only?.name ?? this.session.membership()?.clientName ?? 'Home';
  });
  protected readonly sub = computed(() => {
    const shop = this.session.shop()?.name;
    return shop ? `Kept running by ${shop}` : undefined;
  });
  /** Null for who sees no money. */
  protected readonly balances = computed(() =>
    this.facts.hasValue() ? this.facts.value().balances : null,
  );
  /** What should have been paid is said first. */
  protected readonly overdue = computed(() =>
    (this.balances() ?? []).some(({ overdue }) => overdue > 0),
  );
  protected readonly tally = computed(() => earningOf(this.stores()));
  protected readonly steps = computed(() =>
    this.facts.hasValue() ? nextSteps(this.facts.value()) : [],
  );
  protected readonly shownSteps = computed(() =>
    this.all() ? this.steps() : this.steps().slice(0, stepsAtFirst),
  );

  protected readonly still = computed(() =>
    this.facts.hasValue() ? standingStill(this.facts.value(), new Date()) : [],
  );

  /** Of stores with a machine nobody is on the way to: what the last tech left to do says why. */
  readonly #openItems = rxResource({
    params: () => {
      const waiting = this.still().filter(({ visit }) => !visit);
      return [...new Set(waiting.map(({ machine }) => machine.store.id))].join(' ');
    },
    stream: ({ params }) => this.#api.openItems(params.split(' ').filter(Boolean)),
  });
  protected readonly openItems = computed(() =>
    this.#openItems.hasValue() ? this.#openItems.value() : [],
  );

  constructor() {
    reloadOn(this.facts, 'stores', 'machines', 'visit', 'call', 'payment', 'statement');
  }
}

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
import {
  counted,
  InstantPipe,
  LabelPipe,
  LoadNote,
  MoneyText,
  PageHead,
  Reading,
  SectionHead,
  TicketCard,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { PlatformApi, type Shop } from '../platform-api';
import { DecisionForm } from './decision-form';
import { ShopPlanForm } from './plan-form';
import { consequenceOf, type Decision, eventWords, needsLook, stateWords } from './shop-words';

/** One shop: how its subscription stands, and what the platform can decide about it. */
@Component({
  selector: 'tw-platform-shop-page',
  imports: [
    DecisionForm,
    InstantPipe,
    LabelPipe,
    LoadNote,
    MatButton,
    MoneyText,
    PageHead,
    RouterLink,
    SectionHead,
    ShopPlanForm,
    TicketCard,
  ],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './shop-page.html',
  styles: `
    [stub] > * {
      display: block;
    }
    p {
      margin: 0 0 0.25rem;
    }
    .acts {
      margin-block-start: 0.75rem;
    }
    tw-shop-plan-form,
    tw-decision-form {
      display: block;
      margin-block-start: 1rem;
    }
    .events {
      display: grid;
      gap: 0.5rem;
      margin: 0;
      padding: 0;
      list-style: none;
    }
    .events span {
      display: inline-block;
      min-inline-size: 12rem;
    }
    @media (max-width: 40rem) {
      .events span {
        display: block;
      }
    }
    .audit {
      margin-block-start: 1.5rem;
    }
  `,
})
export class ShopPage implements HasChanges {
  readonly #api = inject(PlatformApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly locale = inject(Reading).locale;
  protected readonly stateWords = stateWords;
  protected readonly needsLook = needsLook;
  protected readonly eventWords = eventWords;
  protected readonly consequence = consequenceOf;

  readonly shopId = input.required<string>();

  protected readonly shop = rxResource({
    params: () => this.shopId(),
    stream: ({ params }) => this.#api.shop(params),
  });
  /** What is being decided, its form standing open. */
  protected readonly deciding = signal<Decision | 'plan' | undefined>(undefined);
  protected readonly decision = computed<Decision | undefined>(() => {
    const deciding = this.deciding();
    return deciding === 'plan' ? undefined : deciding;
  });

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    effect(() => {
      if (this.shop.hasValue()) this.#titles.name(this.shop.value().name);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected sub({ stores, machines, crew }: Shop): string {
    return [
      counted(stores, 'store'),
      counted(machines, 'machine'),
      counted(crew, 'person', 'people') + ' of the crew',
    ].join(' · ');
  }

  protected planChanged(shop: Shop): void {
    this.#show(shop, `${shop.name} is on ${shop.plan.name} now.`);
  }

  protected decided(shop: Shop): void {
    this.#show(shop, `${shop.name} is ${stateWords(shop.state)} now.`);
  }

  #show(shop: Shop, said: string): void {
    this.shop.set(shop);
    this.deciding.set(undefined);
    this.#messages.say(said);
  }
}

import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { Callout } from '@lib/ui';
import { SetUpApi } from './set-up-facts';
import { nextStep, setUpSteps } from './set-up-steps';

/** On the first page of a shop that is not set up yet: the one step that comes next. */
@Component({
  selector: 'tw-set-up-banner',
  imports: [Callout, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (facts.hasValue()) {
      <tw-callout>
        @if (next(); as step) {
          <p>
            Your shop is not set up yet. Next:
            <a [routerLink]="step.link">{{ step.title }}</a>. {{ step.words }}
          </p>
        } @else {
          <p>Everything a shop needs is there.</p>
        }
        <a routerLink="/shop/set-up">Open the set-up guide</a>
      </tw-callout>
    }
  `,
  styles: `
    p {
      margin: 0 0 0.25rem;
    }
  `,
})
export class SetUpBanner {
  readonly #api = inject(SetUpApi);
  protected readonly facts = rxResource({ stream: () => this.#api.facts() });
  protected readonly next = computed(() =>
    this.facts.hasValue() ? nextStep(setUpSteps(this.facts.value())) : undefined,
  );
}

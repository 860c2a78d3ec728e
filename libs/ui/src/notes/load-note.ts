import { ChangeDetectionStrategy, Component, computed, input, type Signal } from '@angular/core';
import { ProblemNote } from './problem-note';

/** What of a resource tells how its loading goes. */
export interface Loadable {
  readonly error: Signal<unknown>;
  reload(): unknown;
}

/**
 * In place of something that is not there yet: lines while it loads, what went wrong when it failed.
 *
 *     @if (store.hasValue()) { ... } @else { <tw-load-note [of]="store" /> }
 */
@Component({
  selector: 'tw-load-note',
  imports: [ProblemNote],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (of().error(); as problem) {
      <tw-problem [problem]="problem" [retriable]="retriable()" (retry)="of().reload()" />
    } @else {
      <p class="tw-unseen" role="status">Loading</p>
      <div class="lines" aria-hidden="true">
        <div></div>
        <div></div>
        <div></div>
      </div>
    }
  `,
  styles: `
    .lines {
      // Shown late, so that a quick answer does not make the page flicker.
      animation: appear 1ms 200ms both;
    }
    .lines div {
      block-size: 1rem;
      margin-block: 1.25rem;
      border-radius: var(--tw-corner);
      background: var(--tw-hairline);
      opacity: 0.6;
    }
    .lines div:nth-child(2) {
      inline-size: 78%;
    }
    @keyframes appear {
      from {
        visibility: hidden;
      }
    }
  `,
})
export class LoadNote {
  readonly of = input.required<Loadable>();

  /** What is not there will not be there a second later either. */
  protected readonly retriable = computed(
    () => (this.of().error() as { kind?: unknown } | undefined)?.kind !== 'not-found',
  );
}

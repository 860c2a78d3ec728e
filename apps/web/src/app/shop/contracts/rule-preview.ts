import { ChangeDetectionStrategy, Component, inject, input, linkedSignal } from '@angular/core';
import { rxResource, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { LoadNote } from '@lib/ui';
import { debounceTime } from 'rxjs';
import { ContractsApi, type RulePreview as Meaning, type Terms } from './contracts-api';
import { NextRounds } from './next-rounds';

interface RuleAsked {
  readonly rule: string;
  readonly startsOn: string;
  readonly endsOn: string | null;
  readonly shift: NonNullable<Terms['shift']>;
}

/** While a rule is typed it is asked about now and then, not at every key. */
const typingPause = 300;

/** What the rule means, as the server will plan it: in words, and the next rounds. */
@Component({
  selector: 'tw-rule-preview',
  imports: [LoadNote, NextRounds],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="tw-sheet" aria-live="polite">
      @if (meaning(); as shown) {
        @if (shown.valid) {
          <p class="words">Rounds come {{ shown.words }}.</p>
          @if (shown.nextRounds.length) {
            <tw-next-rounds [rounds]="shown.nextRounds" />
          } @else {
            <p class="tw-soft">It names no day before the contract ends.</p>
          }
        } @else {
          <p class="alarm">{{ shown.problem }}</p>
        }
      } @else if (asked()?.rule && asked()?.startsOn) {
        <tw-load-note [of]="preview" />
      } @else {
        <p class="tw-soft">Say when rounds come and from when on; the next ones stand here.</p>
      }
    </div>
  `,
  styles: `
    p {
      margin: 0;
    }
    .words {
      margin-block-end: 0.5rem;
      font-weight: 500;
    }
    .alarm {
      color: var(--tw-alarm);
    }
  `,
})
export class RulePreview {
  readonly #api = inject(ContractsApi);

  readonly of = input.required<RuleAsked>();

  protected readonly asked = toSignal(toObservable(this.of).pipe(debounceTime(typingPause)));
  protected readonly preview = rxResource({
    params: () => {
      const asked = this.asked();
      return asked?.rule && asked.startsOn ? asked : undefined;
    },
    stream: ({ params: { endsOn, ...asked } }) =>
      this.#api.preview({ ...asked, ...(endsOn ? { endsOn } : {}) }),
  });
  /** What was meant before stays until the next is known, so that nothing jumps while typing. */
  protected readonly meaning = linkedSignal<Meaning | undefined, Meaning | undefined>({
    source: () => (this.preview.hasValue() ? this.preview.value() : undefined),
    computation: (now, before) => now ?? (this.asked()?.rule ? before?.value : undefined),
  });
}

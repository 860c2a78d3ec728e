import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { InstantPipe, LoadNote, SectionHead } from '@lib/ui';
import { actWords, withTicksTogether } from './act-words';
import { type Visit, type VisitAct, VisitsApi } from './visits-api';

/** Later than this after it happened, an act came from a phone that had no signal. */
const cameLate = 10 * 60_000;

/** The record of a visit: who said what and when, in the order it happened. */
@Component({
  selector: 'tw-visit-acts',
  imports: [InstantPipe, LoadNote, MatButton, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Record" sub="What happened, in its order. Nothing here is changed.">
      @if (!open()) {
        <button matButton="outlined" type="button" (click)="open.set(true)">Show the record</button>
      }
    </tw-section-head>
    @if (open()) {
      @if (acts.hasValue()) {
        <table class="tw-table">
          <thead>
            <tr>
              <th scope="col">When</th>
              <th scope="col">Machine</th>
              <th scope="col">What</th>
              <th scope="col">Who</th>
            </tr>
          </thead>
          <tbody>
            @for (line of lines(); track line.act.id) {
              <tr>
                <td data-label="When">
                  <div>
                    {{ line.act.at | twInstant }}
                    @if (line.late) {
                      <span class="tw-soft">came {{ line.act.receivedAt | twInstant }}</span>
                    }
                  </div>
                </td>
                <td data-label="Machine">{{ line.bay }}</td>
                <td data-label="What">{{ line.words }}</td>
                <td data-label="Who">{{ line.act.by }}</td>
              </tr>
            } @empty {
              <tr>
                <td colspan="4" class="tw-soft">Nobody has recorded anything yet.</td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <tw-load-note [of]="acts" />
      }
    }
  `,
})
export class VisitActs {
  readonly #api = inject(VisitsApi);
  readonly visit = input.required<Visit>();

  protected readonly open = signal(false);
  protected readonly acts = rxResource({
    // The version changes with every act that comes in.
    params: () =>
      this.open() ? { id: this.visit().id, version: this.visit().version } : undefined,
    stream: ({ params }) => this.#api.acts(params.id),
  });
  protected readonly lines = computed(() =>
    withTicksTogether(this.acts.hasValue() ? this.acts.value().items : []).map((act) => ({
      act,
      late: isLate(act),
      ...actWords(act, this.visit()),
    })),
  );
}

function isLate({ at, receivedAt }: VisitAct): boolean {
  return Date.parse(receivedAt) - Date.parse(at) > cameLate;
}

import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { EmptyNote } from '@lib/ui/notes/empty-note';
import { LoadNote } from '@lib/ui/notes/load-note';
import { reloadOn } from '../../core/live/reload-on';
import { HomeApi } from './home-api';
import { LastVisit } from './last-visit';

/** Proof that the machines were put right: the last visits in plain words. */
@Component({
  selector: 'tw-last-visits',
  imports: [EmptyNote, LastVisit, LoadNote],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (visits.hasValue()) {
      @for (visit of visits.value(); track visit.id) {
        <tw-last-visit [visit]="visit" />
      } @empty {
        <tw-empty text="What was found and done on each visit will stand here, with pictures." />
      }
    } @else {
      <tw-load-note [of]="visits" />
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 0.75rem;
    }
  `,
})
export class LastVisits {
  readonly #api = inject(HomeApi);

  readonly limit = input(3);

  protected readonly visits = rxResource({
    params: () => this.limit(),
    stream: ({ params }) => this.#api.lastVisits(params),
  });

  constructor() {
    reloadOn(this.visits, 'visit');
  }
}

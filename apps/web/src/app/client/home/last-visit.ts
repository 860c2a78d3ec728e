import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { LoadNote } from '@lib/ui/notes/load-note';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { counted } from '@lib/ui/words/words';
import { moneyWords } from '../money-words';
import { NearDayPipe } from '../near-day';
import { PhotoStrip } from '../visits/photo-strip';
import { testedBy, testMoneyWords } from '../visits/proof';
import { HomeApi, type VisitItem } from './home-api';

const photosShown = 4;

/** One visit that was made: what was put right, how many pictures prove it, what coins are ours. */
@Component({
  selector: 'tw-last-visit',
  imports: [LoadNote, NearDayPipe, PhotoStrip, RouterLink, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-ticket>
      <div stub>{{ visit().plannedOn | twNearDay }}</div>
      <p>
        <a class="tw-stretched" [routerLink]="['/client/visits', visit().id]">{{
          visit().store.name
        }}</a>
      </p>
      @if (shown.hasValue()) {
        <p>{{ shown.value().words }}</p>
        <p class="tw-soft">{{ proof() }}</p>
        @if (photos().length > 0) {
          @defer (on viewport) {
            <tw-photo-strip [photos]="photos()" />
          } @placeholder {
            <div class="photos"></div>
          }
        }
      } @else {
        <tw-load-note [of]="shown" />
      }
    </tw-ticket>
  `,
  styles: `
    :host {
      display: block;
    }
    p {
      margin: 0;
      overflow-wrap: anywhere;
    }
    a {
      color: var(--tw-ink);
      font-weight: 600;
      text-decoration: none;
    }
    a:hover {
      text-decoration: underline;
    }
    .photos {
      block-size: 4.5rem;
      margin-block: 0.5rem;
    }
  `,
})
export class LastVisit {
  readonly #api = inject(HomeApi);
  readonly #money = moneyWords();

  readonly visit = input.required<VisitItem>();

  protected readonly shown = rxResource({
    params: () => this.visit(),
    stream: ({ params }) => this.#api.visit(params.id),
  });
  readonly #jobs = computed(() => (this.shown.hasValue() ? this.shown.value().jobList : []));
  readonly #allPhotos = computed(() =>
    this.#jobs().flatMap((job) =>
      job.photos.map(({ id }, index) => ({ id, name: `photo ${index + 1} of ${job.machine.bay}` })),
    ),
  );
  protected readonly photos = computed(() => this.#allPhotos().slice(0, photosShown));
  protected readonly proof = computed(() => {
    const pictures = this.#allPhotos().length;
    return [
      pictures > 0 ? `${counted(pictures, 'picture')}.` : '',
      testMoneyWords(testedBy(this.#jobs()), this.#money),
    ]
      .filter(Boolean)
      .join(' ');
  });
}

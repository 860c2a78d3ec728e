import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { LoadNote } from '@lib/ui';
import { forkJoin, map } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { DeliveriesApi } from '../deliveries/deliveries-api';
import { DeliveryDecision } from '../deliveries/delivery-decision';
import { type Run } from './month-close-api';

/** So many stand on the sheet; the list of mails has them all. */
const shownAtMost = 20;

/** The mails of a close that went wrong, each waiting for a person's word. */
@Component({
  selector: 'tw-run-mails',
  imports: [DeliveryDecision, LoadNote, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (toDecide()) {
      <h2>Mails to decide</h2>
      <p class="tw-soft">
        Where the answer was lost, the mail may have arrived. Ask, then say so here: it is never
        sent again by itself.
      </p>
      @if (wrong.hasValue()) {
        <ul>
          @for (mail of wrong.value(); track mail.id) {
            <li>
              <div class="words">
                {{ mail.subject }}
                <span class="tw-soft">
                  {{ mail.recipient }},
                  {{ mail.state === 'uncertain' ? 'answer lost' : mail.lastError || 'not sent' }}
                </span>
              </div>
              <div><tw-delivery-decision [delivery]="mail" (decided)="wrong.reload()" /></div>
            </li>
          }
        </ul>
        @if (toDecide() > wrong.value().length) {
          <a routerLink="/shop/mails" [queryParams]="{ runId: run().id, state: 'uncertain' }">
            See all {{ toDecide() }}
          </a>
        }
      } @else {
        <tw-load-note [of]="wrong" />
      }
    }
  `,
  styles: `
    h2 {
      margin-block: 1.5rem 0.25rem;
    }
    p {
      margin-block-end: 0.5rem;
      font-size: 0.875rem;
    }
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      padding-block: 0.5rem;
      border-block-end: 1px solid var(--tw-hairline);
    }
    .words span {
      display: block;
      font-size: 0.875rem;
      overflow-wrap: anywhere;
    }
    li div:last-child {
      margin-inline-start: -0.75rem;
    }
  `,
})
export class RunMails {
  readonly #api = inject(DeliveriesApi);

  readonly run = input.required<Run>();

  protected readonly toDecide = computed(() => {
    const { uncertain, failed } = this.run().mails;
    return uncertain + failed;
  });
  protected readonly wrong = rxResource({
    params: () => (this.toDecide() ? { runId: this.run().id, count: this.toDecide() } : undefined),
    stream: ({ params: { runId } }) =>
      forkJoin(
        (['uncertain', 'failed'] as const).map((state) =>
          this.#api.list({ runId, state, limit: shownAtMost }),
        ),
      ).pipe(map((pages) => pages.flatMap(({ items }) => items))),
  });

  constructor() {
    reloadOn(this.wrong, 'delivery');
  }
}

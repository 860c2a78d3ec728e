import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { InstantPipe, LoadNote, PageHead } from '@lib/ui';
import { filter, interval } from 'rxjs';
import { PlatformApi } from '../platform-api';
import { queueWords } from './queue-words';

/** Queues announce nothing, so the page looks again by itself. */
const everyMilliseconds = 10_000;

/** What waits to be done in the background, and what failed. */
@Component({
  selector: 'tw-queue-list',
  imports: [InstantPipe, LoadNote, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Queues"
      sub="The work in the background, looked at again every ten seconds"
    />
    @if (queues.hasValue()) {
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">Queue</th>
            <th scope="col" class="num">Waiting</th>
            <th scope="col" class="num">Being done</th>
            <th scope="col" class="num">Failed in a day</th>
            <th scope="col">Waits longest since</th>
          </tr>
        </thead>
        <tbody>
          @for (queue of queues.value().items; track queue.queue) {
            <tr>
              <th scope="row">{{ queueWords(queue.queue) }}</th>
              <td class="num" data-label="Waiting">{{ queue.waiting }}</td>
              <td class="num" data-label="Being done">{{ queue.active }}</td>
              <td class="num" data-label="Failed in a day" [class.alarm]="queue.failed > 0">
                {{ queue.failed }}
              </td>
              <td data-label="Longest since">
                {{ queue.oldestWaitingAt ? (queue.oldestWaitingAt | twInstant) : 'none waits' }}
              </td>
            </tr>
          }
        </tbody>
      </table>
    } @else {
      <tw-load-note [of]="queues" />
    }
  `,
})
export class QueueList {
  readonly #api = inject(PlatformApi);

  protected readonly queueWords = queueWords;
  protected readonly queues = rxResource({ stream: () => this.#api.queues() });

  constructor() {
    interval(everyMilliseconds)
      .pipe(
        filter(() => document.visibilityState === 'visible'),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.queues.reload());
  }
}

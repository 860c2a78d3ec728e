import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { StateMark } from '@lib/ui/machine-glyph/state-mark';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { counted, LabelPipe, WordPipe } from '@lib/ui/words/words';
import { moneyWords } from '../money-words';
import { PhotoStrip } from './photo-strip';
import { testedBy, testMoneyWords } from './proof';
import { type Job } from './visits-api';

/** The work on one machine: what was wrong, what was done, and the proof of it. */
@Component({
  selector: 'tw-visit-job',
  imports: [LabelPipe, PhotoStrip, RouterLink, StateMark, TicketCard, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let shown = job();
    <tw-ticket wide>
      <div stub>
        <a [routerLink]="['/client/machines', shown.machine.id]">{{ shown.machine.bay }}</a>
        <span>{{ shown.machine.make }} {{ shown.machine.model }}</span>
      </div>
      <h3>{{ shown.result ? (shown.result | twLabel) : 'Being worked on' }}</h3>
      <dl class="tw-facts">
        @if (shown.symptom) {
          <dt>Reported</dt>
          <dd>{{ shown.symptom | twWord }}</dd>
        }
        @if (shown.finding) {
          <dt>Found</dt>
          <dd>{{ shown.finding }}</dd>
        }
        @if (shown.cause && shown.cause !== 'nothing_found') {
          <dt>Cause</dt>
          <dd>{{ shown.cause | twWord }}</dd>
        }
        @if (shown.action) {
          <dt>Done</dt>
          <dd>{{ shown.action }}</dd>
        }
        @if (parts(); as words) {
          <dt>Fitted</dt>
          <dd>{{ words }}</dd>
        }
        @if (tests(); as words) {
          <dt>Tested</dt>
          <dd>{{ words }}</dd>
        }
        @if (shown.machineState) {
          <dt>Left as</dt>
          <dd><tw-state-mark [state]="shown.machineState" /> {{ shown.machineState | twWord }}</dd>
        }
      </dl>
      @if (photos().length > 0) {
        @defer (on viewport) {
          <tw-photo-strip [photos]="photos()" />
        } @placeholder {
          <div class="photos"></div>
        }
      }
    </tw-ticket>
  `,
  styles: `
    :host {
      display: block;
    }
    [stub] a {
      font-size: 1.125rem;
      font-weight: 600;
    }
    [stub] span {
      display: block;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
    h3 {
      margin: 0 0 0.25rem;
    }
    .photos {
      block-size: 4.5rem;
      margin-block: 0.5rem;
    }
  `,
})
export class VisitJob {
  readonly #money = moneyWords();

  readonly job = input.required<Job>();

  protected readonly parts = computed(() =>
    this.job()
      .parts.map(({ description, quantityMilli, source }) => {
        const times = quantityMilli === 1000 ? '' : `${quantityMilli / 1000} × `;
        const own = source === 'storeroom' ? ', from the store’s own' : '';
        return `${times}${description}${own}`;
      })
      .join('; '),
  );
  protected readonly tests = computed(() => {
    const job = this.job();
    if (job.testCycles === 0) return '';
    const ours = testMoneyWords(testedBy([job]), this.#money);
    return `${counted(job.testCycles, 'full cycle')} run. ${ours}`.trim();
  });
  protected readonly photos = computed(() =>
    this.job().photos.map(({ id }, index) => ({
      id,
      name: `photo ${index + 1} of ${this.job().machine.bay}`,
    })),
  );
}

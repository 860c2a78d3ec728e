import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type AnswerOf } from '@lib/contracts/web';
import { EmptyNote, InstantPipe, LabelPipe, SectionHead, TicketCard } from '@lib/ui';

/** The newest calls nobody is planned for. */
@Component({
  selector: 'tw-open-calls',
  imports: [EmptyNote, InstantPipe, LabelPipe, RouterLink, SectionHead, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Calls without a visit">
      @if (count() > calls().length) {
        <a routerLink="/shop/calls">All {{ count() }}</a>
      }
    </tw-section-head>
    @for (call of calls(); track call.id) {
      <tw-ticket>
        <div stub>
          <span class="tw-soft">Call</span>
          <strong class="tw-figures">{{ call.number }}</strong>
        </div>
        <a class="tw-stretched" [routerLink]="['/shop/calls', call.id]">
          {{ call.store.name }}{{ call.machine ? ', ' + call.machine.bay : '' }}
        </a>
        <p>{{ call.words || (call.symptom | twLabel) }}</p>
        <p class="tw-soft">{{ call.reportedBy }}, {{ call.reportedAt | twInstant }}</p>
      </tw-ticket>
    } @empty {
      <tw-empty text="Every call has its visit." />
    }
  `,
  styles: `
    tw-ticket {
      margin-block-end: 0.75rem;
    }
    [stub] > * {
      display: block;
    }
    a {
      font-weight: 500;
    }
    p {
      margin: 0;
    }
    p.tw-soft {
      font-size: 0.875rem;
    }
  `,
})
export class OpenCalls {
  readonly calls = input.required<AnswerOf<'calls.list'>['items']>();
  readonly count = input.required<number>();
}

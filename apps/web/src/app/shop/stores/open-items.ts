import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { InstantPipe, SectionHead } from '@lib/ui';
import { type Store } from './stores-api';

/** What a visit left for the next tech to do. */
@Component({
  selector: 'tw-open-items',
  imports: [InstantPipe, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Left to do" />
    <ul>
      @for (item of items(); track item.id) {
        <li>
          @if (item.machine) {
            <strong>{{ item.machine.bay }}</strong>
          }
          {{ item.words }}
          <span class="tw-soft">since {{ item.createdAt | twInstant }}</span>
        </li>
      } @empty {
        <li class="tw-soft">Nothing was left over by the last visits.</li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      padding-block: 0.5rem;
      border-block-end: 1px solid var(--tw-hairline);
      overflow-wrap: anywhere;
    }
    strong {
      font-weight: 600;
    }
    span {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class OpenItems {
  readonly items = input.required<Store['openItems']>();
}

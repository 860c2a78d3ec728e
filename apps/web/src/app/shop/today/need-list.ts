import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type Need } from './need';

/** What waits, one line each: the figure, the words, and the way there. */
@Component({
  selector: 'tw-need-list',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ul>
      @for (need of needs(); track need.id) {
        <li [class.pressing]="need.pressing">
          <span class="what">
            <span class="words">
              @if (need.count) {
                <strong class="tw-figures">{{ need.count }}</strong>
              }
              {{ need.words }}
            </span>
            @if (need.detail) {
              <span class="detail tw-soft">{{ need.detail }}</span>
            }
          </span>
          <a [routerLink]="need.link" [queryParams]="need.query">
            {{ need.label }}<span class="tw-unseen">: {{ need.words }}</span>
          </a>
        </li>
      } @empty {
        <li class="none">Nothing waits for you. New calls appear here by themselves.</li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0 0 1rem;
      padding: 0;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
      list-style: none;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0 1rem;
      min-block-size: 3rem;
      padding: 0.625rem 1rem;
      border-inline-start: 4px solid transparent;
    }
    li + li {
      border-block-start: 1px solid var(--tw-hairline);
    }
    .pressing {
      border-inline-start-color: var(--tw-alarm);
    }
    .pressing strong {
      color: var(--tw-alarm);
    }
    .what {
      flex: 1 1 14rem;
      min-inline-size: 0;
      overflow-wrap: anywhere;
    }
    .words {
      display: block;
      font-weight: 500;
    }
    strong {
      margin-inline-end: 0.25rem;
      font-weight: 600;
    }
    .detail {
      display: block;
      font-size: 0.875rem;
    }
    a {
      flex: none;
      padding-block: 0.5rem;
    }
    .none {
      color: var(--tw-soft);
    }
  `,
})
export class NeedList {
  readonly needs = input.required<readonly Need[]>();
}

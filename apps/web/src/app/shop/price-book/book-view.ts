import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type ComparedSection } from './compare-books';

/** An edition to be read, with what it changed beside it. */
@Component({
  selector: 'tw-book-view',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (part of sections(); track part.section) {
      <table class="tw-table tw-table-kept">
        <caption>
          {{
            part.section
          }}
        </caption>
        <thead class="tw-unseen">
          <tr>
            <th scope="col">Rule</th>
            <th scope="col">Says</th>
          </tr>
        </thead>
        <tbody>
          @for (line of part.lines; track line.key) {
            <tr [class.chosen]="line.before !== undefined">
              <th scope="row">{{ line.label }}</th>
              <td class="tw-figures">
                {{ line.gone ? 'gone' : line.value }}
                @if (line.before === null) {
                  <span class="before tw-soft">new</span>
                } @else if (line.before !== undefined) {
                  <span class="before tw-soft">before: {{ line.before }}</span>
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    }
  `,
  styles: `
    table {
      margin-block-end: 1.5rem;
    }
    th[scope='row'] {
      inline-size: 45%;
      font-weight: 400;
    }
    th,
    td {
      overflow-wrap: anywhere;
    }
    .before {
      margin-inline-start: 0.75rem;
    }
  `,
})
export class BookView {
  readonly sections = input.required<readonly ComparedSection[]>();
}

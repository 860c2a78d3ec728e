import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
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
            @if (compares()) {
              <th scope="col">Said before</th>
            }
          </tr>
        </thead>
        <tbody>
          @for (line of part.lines; track line.key) {
            <tr [class.chosen]="line.before !== undefined">
              <th scope="row">{{ line.label }}</th>
              <td class="tw-figures">{{ line.gone ? 'gone' : line.value }}</td>
              @if (compares()) {
                <td class="tw-figures tw-soft">
                  @if (line.before === null) {
                    new
                  } @else if (line.before !== undefined) {
                    before: {{ line.before }}
                  }
                </td>
              }
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
  `,
})
export class BookView {
  readonly sections = input.required<readonly ComparedSection[]>();
  protected readonly compares = computed(() => this.sections().some(({ changes }) => changes > 0));
}

import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { InstantPipe, LabelPipe, ListShell, listState, PageHead } from '@lib/ui';
import { RouterLink } from '@angular/router';
import { RowsExport } from '../../core/lists/rows-export';
import { detailsWords, subjectLink } from './audit-words';
import { type AuditRow, SubscriptionApi } from './subscription-api';

/** Who did what in the shop: an owner's look over everybody's shoulder. */
@Component({
  selector: 'tw-audit-list',
  imports: [InstantPipe, LabelPipe, ListShell, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Who did what"
      sub="Written down as it happened; nobody can change it."
      upLink="/shop/subscription"
      upLabel="Subscription"
    />
    <tw-list-shell
      [list]="rows"
      searchLabel="Search by person or act"
      empty="What people of the shop do appears here, with when and to what."
      [csv]="true"
      (csvAsked)="save()"
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">When</th>
            <th scope="col">Who</th>
            <th scope="col">What</th>
            <th scope="col">Details</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows.items(); track row.id) {
            @let link = subjectLink(row);
            <tr>
              <td data-label="When" class="when">{{ row.at | twInstant }}</td>
              <td data-label="Who">{{ row.byName ?? 'by itself' }}</td>
              <th scope="row">
                @if (link) {
                  <a [routerLink]="link">{{ row.what | twLabel }}</a>
                } @else {
                  {{ row.what | twLabel }}
                }
              </th>
              @let details = detailsWords(row);
              <td [attr.data-label]="details ? 'Details' : null" class="tw-soft">{{ details }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
  styles: `
    .when {
      white-space: nowrap;
    }
  `,
})
export class AuditList {
  readonly #api = inject(SubscriptionApi);
  readonly #exports = inject(RowsExport);

  protected readonly subjectLink = subjectLink;
  protected readonly detailsWords = detailsWords;
  protected readonly rows = listState((ask) => this.#api.audit(ask), {
    sorts: { '-at': 'Newest first' },
  });

  protected save(): void {
    const ask = this.rows.ask();
    void this.#exports.save<AuditRow>({
      name: 'who-did-what',
      one: 'act',
      columns: [
        { head: 'When', text: (row) => row.at },
        { head: 'Who', text: (row) => row.byName },
        { head: 'What', text: (row) => row.what },
        { head: 'Subject', text: (row) => row.subjectKind },
        { head: 'Subject id', text: (row) => row.subjectId },
        { head: 'Details', text: (row) => detailsWords(row) },
      ],
      page: (asked) => this.#api.audit({ ...ask, ...asked }),
    });
  }
}

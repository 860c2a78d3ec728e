import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { InstantPipe, LabelPipe, ListShell, listState, PageHead } from '@lib/ui';
import { filtersFromAddress, keepInAddress } from '../../core/lists/address-filters';
import { RowsExport } from '../../core/lists/rows-export';
import { type AuditRow, PlatformApi } from '../platform-api';
import { detailsWords } from './details-words';

/** Who did what in the platform area; rows are never changed. */
@Component({
  selector: 'tw-platform-audit-list',
  imports: [InstantPipe, LabelPipe, ListShell, MatButton, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Audit" sub="Who did what in the platform area">
      @if (rows.filters().shopId) {
        <button matButton="outlined" type="button" (click)="rows.filterBy('shopId', '')">
          Of all shops
        </button>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="rows"
      searchLabel="Search by act or person"
      empty="Each change in the platform area is written down here, with who made it."
      [csv]="true"
      (csvAsked)="save()"
    >
      <table class="tw-table">
        <thead>
          <tr>
            <th scope="col">When</th>
            <th scope="col">Who</th>
            <th scope="col">What</th>
            <th scope="col">Shop</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows.items(); track row.id) {
            <tr>
              <th scope="row">{{ row.at | twInstant }}</th>
              <td data-label="Who">{{ row.byName ?? 'nobody signed in' }}</td>
              <td data-label="What">
                <div>
                  {{ row.what | twLabel }}
                  <span class="details tw-soft">{{ details(row.details) }}</span>
                </div>
              </td>
              <td data-label="Shop">
                @if (row.shopId) {
                  <a [routerLink]="['/platform/shops', row.shopId]">{{ row.shopName }}</a>
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tw-list-shell>
  `,
  styles: `
    .details {
      display: block;
      font-size: 0.875rem;
      overflow-wrap: anywhere;
    }
  `,
})
export class AuditList {
  readonly #api = inject(PlatformApi);
  readonly #exports = inject(RowsExport);
  protected readonly details = detailsWords;

  protected readonly rows = listState((ask) => this.#api.audit(ask), {
    sorts: { '-at': 'Newest' },
    filters: filtersFromAddress({ shopId: '' as string }),
  });

  constructor() {
    keepInAddress(this.rows);
  }

  protected save(): void {
    void this.#exports.save<AuditRow>({
      name: 'platform-audit',
      one: 'row',
      columns: [
        { head: 'When', text: ({ at }) => at },
        { head: 'Who', text: ({ byName }) => byName },
        { head: 'What', text: ({ what }) => what },
        { head: 'Shop', text: ({ shopName }) => shopName },
        { head: 'Details', text: ({ details }) => detailsWords(details) },
      ],
      page: (asked) => this.#api.audit({ ...this.rows.ask(), ...asked }),
    });
  }
}

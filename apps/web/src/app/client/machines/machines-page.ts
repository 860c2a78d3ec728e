import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { PageHead } from '@lib/ui/head/page-head';
import { ListShell } from '@lib/ui/list/list-shell';
import { listState } from '@lib/ui/list/list-state';
import { reloadOn } from '../../core/live/reload-on';
import { Session } from '../../core/session/session';
import { FloorsApi } from '../floors/floors-api';
import { StoreFloor } from '../floors/store-floor';

/** The floors of all stores; each machine on them opens its page. */
@Component({
  selector: 'tw-machines-page',
  imports: [ListShell, MatButton, PageHead, RouterLink, StoreFloor],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Machines" sub="Touch a machine to see what was done to it">
      @if (session.mayChange('calls.report')) {
        <a matButton="filled" routerLink="/client/calls/new">Report a fault</a>
      }
    </tw-page-head>
    <tw-list-shell
      [list]="stores"
      [searchable]="stores.narrowed() || stores.count().value > 3"
      searchLabel="Search stores"
      empty="Your stores and their machines stand here once the shop has written them down."
    >
      @for (store of stores.items(); track store.id) {
        @defer (on viewport) {
          <tw-store-floor [store]="store" [level]="2" />
        } @placeholder {
          <div class="place"></div>
        }
      }
    </tw-list-shell>
  `,
  styles: `
    tw-store-floor {
      margin-block-end: 1.5rem;
    }
    .place {
      block-size: 22rem;
    }
  `,
})
export class MachinesPage {
  readonly #api = inject(FloorsApi);
  protected readonly session = inject(Session);

  protected readonly stores = listState((ask) => this.#api.stores({ ...ask, limit: 10 }), {
    sorts: { name: 'Name', number: 'Number' },
  });

  constructor() {
    reloadOn(this.stores, 'stores', 'machines');
  }
}

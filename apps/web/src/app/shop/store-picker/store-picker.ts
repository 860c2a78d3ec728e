import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { FindField } from '@lib/ui';
import { map } from 'rxjs';
import { type StoreSummary, StoresApi } from '../stores/stores-api';

/** Finds a store by its name or number while it is typed. */
@Component({
  selector: 'tw-store-picker',
  imports: [FindField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-find-field
      hint="By name or number"
      none="No store is called so."
      [label]="label()"
      [find]="find"
      [words]="words"
      (picked)="picked.emit($event)"
    />
  `,
  styles: `
    :host {
      display: block;
    }
  `,
})
export class StorePicker {
  readonly #api = inject(StoresApi);
  readonly label = input('Store');
  readonly picked = output<StoreSummary>();

  protected readonly find = (typed: string) =>
    this.#api.list({ q: typed, limit: 10 }).pipe(map(({ items }) => items));
  protected readonly words = ({ name, client }: StoreSummary) => `${name}, ${client.name}`;
}

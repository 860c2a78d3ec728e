import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { FindField } from '@lib/ui';
import { map } from 'rxjs';
import { type Part, PartsApi } from './parts-api';

/** Finds a part by number or name while it is typed. */
@Component({
  selector: 'tw-part-picker',
  imports: [FindField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-find-field [label]="label()" [find]="find" [words]="words" (picked)="picked.emit($event)" />
  `,
  styles: `
    :host {
      display: block;
    }
  `,
})
export class PartPicker {
  readonly #api = inject(PartsApi);

  readonly label = input('Find a part');
  /** A part that cannot be chosen, because it is the one in question. */
  readonly except = input<string>();
  readonly picked = output<Part>();

  protected readonly find = (typed: string) =>
    this.#api
      .list({ q: typed, limit: 10 })
      .pipe(map(({ items }) => items.filter(({ id }) => id !== this.except())));
  protected readonly words = ({ number, name }: Part) => `${number}, ${name}`;
}

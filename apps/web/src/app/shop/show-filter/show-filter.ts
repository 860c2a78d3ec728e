import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type Choice, ChoiceFilter } from '@lib/ui';

/** The filter of things that can end: '' is those that stand. */
export type Shown = '' | 'ended' | 'all';

interface Showing {
  filters(): { readonly show: Shown };
  filterBy(name: 'show', value: Shown): void;
}

const others: readonly Choice<Shown>[] = [
  { value: 'ended', label: 'Ended' },
  { value: 'all', label: 'All' },
];

@Component({
  selector: 'tw-show-filter',
  imports: [ChoiceFilter],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-choice-filter
      label="Show"
      any="Current"
      [options]="others"
      [value]="list().filters().show"
      (chosen)="list().filterBy('show', $any($event))"
    />
  `,
  styles: `
    :host {
      display: contents;
    }
  `,
})
export class ShowFilter {
  readonly list = input.required<Showing>();
  protected readonly others = others;
}

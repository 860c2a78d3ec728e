import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { distanceText, distanceUnit, MoneyText, Reading, SectionHead } from '@lib/ui';
import { type Store } from './stores-api';

/** Where a store is, when it is open, how to get in, and what prices and taxes go by. */
@Component({
  selector: 'tw-store-facts',
  imports: [MoneyText, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Getting there" />
    <dl class="tw-facts">
      <dt>Address</dt>
      <dd class="lines">{{ store().address || 'not noted' }}</dd>
      <dt>Hours</dt>
      <dd class="lines">{{ store().hours || 'not noted' }}</dd>
      <dt>How to get in</dt>
      <dd class="lines">{{ store().accessWords || 'not noted' }}</dd>
      @if (distance(); as text) {
        <dt>How far</dt>
        <dd>{{ text }}</dd>
      }
      @if (store().tripPlace) {
        <dt>Part of your area</dt>
        <dd>{{ store().tripPlace }}</dd>
      }
      <dt>Tax place</dt>
      <dd>{{ store().taxPlace || 'none' }}</dd>
      @if (store().zone) {
        <dt>Time zone</dt>
        <dd>{{ store().zone?.replaceAll('_', ' ') }}</dd>
      }
      @if (store().cardValue) {
        <dt>Test card</dt>
        <dd><tw-money [amount]="store().cardValue" /></dd>
      }
    </dl>
  `,
  styles: `
    .lines {
      white-space: pre-line;
    }
  `,
})
export class StoreFacts {
  readonly #reading = inject(Reading);
  readonly store = input.required<Store>();

  protected readonly distance = computed(() => {
    const metres = this.store().tripMetres;
    if (metres === null) return undefined;
    const unit = distanceUnit(this.#reading.locale());
    return `${distanceText(metres, unit)} ${unit.sign}`;
  });
}

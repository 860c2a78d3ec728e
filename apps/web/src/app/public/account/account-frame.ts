import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { AreaFrame } from '../../core/frame/area-frame';
import { type NavItem } from '../../core/frame/nav-item';
import { type Area, areaOf, areas } from '../../core/navigation/areas';
import { Session } from '../../core/session/session';

/** The account looks like a page of whichever area the person came from. */
@Component({
  selector: 'tw-account-frame',
  imports: [AreaFrame],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tw-area-frame [area]="area()" [items]="items()" [thumb]="area().name === 'Field'" />`,
})
export class AccountFrame {
  readonly #session = inject(Session);

  protected readonly area = computed<Area>(() => {
    const role = this.#session.role();
    return role ? areaOf(role) : areas.shop;
  });
  protected readonly items = computed<readonly NavItem[]>(() => [
    { label: `Back to ${this.area().name}`, link: this.area().path },
    { label: 'Account', link: '/account' },
  ]);
}

import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { AreaFrame } from '../core/frame/area-frame';
import { type NavItem } from '../core/frame/nav-item';
import { areas } from '../core/navigation/areas';
import { Sender } from './outbox/sender';

@Component({
  selector: 'tw-field-frame',
  imports: [AreaFrame],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-area-frame [area]="area" [items]="items" [thumb]="true" [offlineText]="offline" />
  `,
})
export class FieldFrame {
  protected readonly area = areas.field;
  protected readonly offline =
    'No signal. What you record is kept here and sent when there is one.';
  protected readonly items: readonly NavItem[] = [
    { label: 'Day', link: '/field/day' },
    { label: 'Entries', link: '/field/outbox' },
    // In a small shop the owner goes out too.
    { label: 'Shop', link: '/shop/today', needs: 'visits.plan' },
    { label: 'Account', link: '/account' },
  ];

  constructor() {
    // Sends what waits for as long as the area is open.
    inject(Sender);
  }
}

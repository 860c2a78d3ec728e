import { ChangeDetectionStrategy, Component } from '@angular/core';
import { AreaFrame } from '../core/frame/area-frame';
import { type NavItem } from '../core/frame/nav-item';
import { areas } from '../core/navigation/areas';

@Component({
  selector: 'tw-platform-frame',
  imports: [AreaFrame],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tw-area-frame [area]="area" [items]="items" />`,
})
export class PlatformFrame {
  protected readonly area = areas.platform;
  protected readonly items: readonly NavItem[] = [
    { label: 'Shops', link: '/platform/shops', needs: 'platform.read' },
    { label: 'Plans', link: '/platform/plans', needs: 'platform.read' },
    { label: 'Queues', link: '/platform/queues', needs: 'platform.read' },
    { label: 'Mail', link: '/platform/mail', needs: 'platform.read' },
    { label: 'Card events', link: '/platform/card-events', needs: 'platform.read' },
    { label: 'Audit', link: '/platform/audit', needs: 'platform.read' },
  ];
}

import { ChangeDetectionStrategy, Component } from '@angular/core';
import { AreaFrame } from '../core/frame/area-frame';
import { type NavItem } from '../core/frame/nav-item';
import { areas } from '../core/navigation/areas';

@Component({
  selector: 'tw-client-frame',
  imports: [AreaFrame],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tw-area-frame [area]="area" [items]="items" />`,
})
export class ClientFrame {
  protected readonly area = areas.client;
  protected readonly items: readonly NavItem[] = [
    { label: 'Home', link: '/client/home' },
    { label: 'Machines', link: '/client/machines', needs: 'machines.read' },
    { label: 'Calls', link: '/client/calls', needs: 'calls.read' },
    { label: 'Visits', link: '/client/visits', needs: 'visits.read' },
    { label: 'Statements', link: '/client/statements', needs: 'statements.read' },
    { label: 'Payments', link: '/client/payments', needs: 'payments.read' },
    { label: 'Contracts', link: '/client/contracts', needs: 'contracts.read' },
  ];
}

import { ChangeDetectionStrategy, Component } from '@angular/core';
import { AreaFrame } from '../core/frame/area-frame';
import { type NavItem } from '../core/frame/nav-item';
import { areas } from '../core/navigation/areas';

@Component({
  selector: 'tw-shop-frame',
  imports: [AreaFrame],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tw-area-frame [area]="area" [items]="items" />`,
})
export class ShopFrame {
  protected readonly area = areas.shop;
  protected readonly items: readonly NavItem[] = [
    { label: 'Today', link: '/shop/today' },
    { label: 'Calls', link: '/shop/calls', needs: 'calls.read' },
    { label: 'Visits', link: '/shop/visits', needs: 'visits.read' },
    { label: 'Rulings', link: '/shop/rulings', needs: 'rulings.read' },
    { label: 'Clients', link: '/shop/clients', needs: 'clients.read' },
    { label: 'Stores', link: '/shop/stores', needs: 'clients.read' },
    { label: 'Machines', link: '/shop/machines', needs: 'machines.read' },
    { label: 'Statements', link: '/shop/statements', needs: 'statements.read' },
    { label: 'Payments', link: '/shop/payments', needs: 'payments.read' },
    { label: 'Contracts', link: '/shop/contracts', needs: 'contracts.read' },
    { label: 'Price book', link: '/shop/price-book', needs: 'prices.read' },
    { label: 'Parts', link: '/shop/parts', needs: 'prices.read' },
    { label: 'Crew', link: '/shop/crew', needs: 'crew.read' },
    { label: 'Settings', link: '/shop/settings', needs: 'settings.change' },
  ];
}

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
    { label: 'Day sheet', link: '/shop/day-sheet', needs: 'visits.plan' },
    { label: 'Own day', link: '/field/day', needs: 'visits.record' },
    { label: 'Rulings', link: '/shop/rulings', needs: 'rulings.read' },
    { label: 'Tickets', link: '/shop/tickets', needs: 'tickets.read' },
    { label: 'Clients', link: '/shop/clients', needs: 'clients.read', group: 'Clients' },
    { label: 'Stores', link: '/shop/stores', needs: 'clients.read', group: 'Clients' },
    { label: 'Machines', link: '/shop/machines', needs: 'machines.read', group: 'Clients' },
    { label: 'Contracts', link: '/shop/contracts', needs: 'contracts.read', group: 'Clients' },
    { label: 'Month close', link: '/shop/month-close', needs: 'statements.close', group: 'Money' },
    { label: 'Statements', link: '/shop/statements', needs: 'statements.read', group: 'Money' },
    { label: 'Payments', link: '/shop/payments', needs: 'payments.read', group: 'Money' },
    { label: 'Receivables', link: '/shop/receivables', needs: 'ledger.read', group: 'Money' },
    { label: 'Ledger', link: '/shop/ledger', needs: 'ledger.read', group: 'Money' },
    { label: 'Price book', link: '/shop/price-book', needs: 'prices.read', group: 'Shop' },
    { label: 'Parts', link: '/shop/parts', needs: 'prices.read', group: 'Shop' },
    { label: 'Crew', link: '/shop/crew', needs: 'crew.read', group: 'Shop' },
    { label: 'Mails', link: '/shop/mails', needs: 'deliveries.read', group: 'Shop' },
    {
      label: 'Subscription',
      link: '/shop/subscription',
      needs: 'subscription.read',
      group: 'Shop',
    },
    { label: 'Settings', link: '/shop/settings', needs: 'settings.change', group: 'Shop' },
  ];
}

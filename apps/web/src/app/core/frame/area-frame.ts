import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { StatusLine } from '@lib/ui/notes/status-line';
import { filter } from 'rxjs';
import { type Area } from '../navigation/areas';
import { Messages } from '../messages/messages';
import { Connection } from '../offline/connection';
import { Session } from '../session/session';
import { AccountMenu } from './account-menu';
import { type NavItem } from './nav-item';

/**
 * What surrounds every page of an area: the edge of its copy, navigation, the account, what just
 * happened, and the page itself. An area gives its items:
 *
 *     <tw-area-frame [area]="area" [items]="items" />
 */
@Component({
  selector: 'tw-area-frame',
  imports: [AccountMenu, RouterLink, RouterLinkActive, RouterOutlet, StatusLine],
  templateUrl: './area-frame.html',
  styleUrl: './area-frame.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    '[attr.data-copy]': 'area().copy',
    '[class.tw-thumb]': 'thumb()',
    '(keydown.escape)': 'open.set(false)',
  },
})
export class AreaFrame {
  protected readonly session = inject(Session);
  protected readonly messages = inject(Messages);
  protected readonly connection = inject(Connection);

  readonly area = input.required<Area>();
  readonly items = input.required<readonly NavItem[]>();
  /** For one-handed use: navigation at the bottom on a phone, and larger targets. */
  readonly thumb = input(false, { transform: booleanAttribute });
  /** What being offline means here. */
  readonly offlineText = input('No connection. What you see may be old, and nothing can be saved.');

  protected readonly open = signal(false);
  protected readonly shown = computed(() =>
    this.items().filter(({ needs }) => !needs || this.session.may(needs)),
  );
  /** The items under their headings, in the order in which each heading first comes. */
  protected readonly groups = computed(() => {
    const items = this.shown();
    const names = [...new Set(items.map(({ group }) => group ?? ''))];
    return names.map((name) => ({
      name,
      items: items.filter(({ group }) => (group ?? '') === name),
    }));
  });
  protected readonly belongsTo = computed(() => {
    const membership = this.session.membership();
    return (
      membership?.clientName ??
      this.session.shop()?.name ??
      membership?.shopName ??
      this.area().name
    );
  });

  constructor() {
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.open.set(false));
  }
}

import { type Permission } from '@lib/contracts/web';

export interface NavItem {
  readonly label: string;
  readonly link: string;
  /** Shown only to whose role holds it. */
  readonly needs?: Permission;
  /** The heading it stands under, where an area has too many pages for one list. */
  readonly group?: string;
}

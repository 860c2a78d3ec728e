import { ChangeDetectionStrategy, Component } from '@angular/core';
import { EmptyNote, PageHead } from '@lib/ui';

/** Holds the place until the area's own first page is built. */
@Component({
  selector: 'tw-shop-landing',
  imports: [EmptyNote, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Today" />
    <tw-empty
      text="The calls, visits and rulings of the day will stand here. This page is not built yet."
    />
  `,
})
export class ShopLanding {}

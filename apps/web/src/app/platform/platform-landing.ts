import { ChangeDetectionStrategy, Component } from '@angular/core';
import { EmptyNote, PageHead } from '@lib/ui';

/** Holds the place until the area's own first page is built. */
@Component({
  selector: 'tw-platform-landing',
  imports: [EmptyNote, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Shops" />
    <tw-empty
      text="The shops and their subscriptions will stand here. This page is not built yet."
    />
  `,
})
export class PlatformLanding {}

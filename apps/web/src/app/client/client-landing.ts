import { ChangeDetectionStrategy, Component } from '@angular/core';
import { EmptyNote, PageHead } from '@lib/ui';

/** Holds the place until the area's own first page is built. */
@Component({
  selector: 'tw-client-landing',
  imports: [EmptyNote, PageHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Home" />
    <tw-empty
      text="Your stores, their machines and what is owed will stand here. This page is not built yet."
    />
  `,
})
export class ClientLanding {}

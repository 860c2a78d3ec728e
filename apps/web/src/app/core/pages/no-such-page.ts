import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PageHead } from '@lib/ui/head/page-head';
import { EmptyNote } from '@lib/ui/notes/empty-note';

/** As the not-found page, inside an area's frame. */
@Component({
  selector: 'tw-no-such-page',
  imports: [EmptyNote, PageHead, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="There is no such page" />
    <tw-empty text="The address may be mistyped, or what was here is gone.">
      <a routerLink="/">Go to your start page</a>
    </tw-empty>
  `,
})
export class NoSuchPage {}

import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { PlainPage } from './plain-page';

/** A page that could not be opened: mostly no connection, or a version that is no longer served. */
@Component({
  selector: 'tw-went-wrong',
  imports: [MatButton, PlainPage],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-plain-page heading="The page could not be opened">
      <p>There may be no connection, or Tumblewright was renewed in the meantime.</p>
      <button matButton="filled" type="button" (click)="reload()">Try again</button>
    </tw-plain-page>
  `,
})
export class WentWrong {
  protected reload(): void {
    location.reload();
  }
}

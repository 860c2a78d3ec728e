import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PlainPage } from './plain-page';

@Component({
  selector: 'tw-not-found',
  imports: [PlainPage, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-plain-page heading="There is no such page">
      <p>The address may be mistyped, or what was here is gone.</p>
      <p><a routerLink="/">Go to your start page</a></p>
    </tw-plain-page>
  `,
})
export class NotFound {}

import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/**
 * What changes the work stands before the work: a condition of the store (`waiting`), a hazard or a
 * refusal (`alarm`), or plain advice. The words must carry the meaning; the colour only helps.
 */
@Component({
  selector: 'tw-callout',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<ng-content />`,
  host: { '[attr.data-tone]': 'tone()' },
  styles: `
    :host {
      display: block;
      padding: 0.625rem 0.875rem;
      border-inline-start: 4px solid var(--tw-carbon);
      background: var(--tw-white-tint);
      color: var(--tw-ink);
    }
    :host([data-tone='waiting']) {
      border-color: var(--tw-ochre);
      background: var(--tw-ochre-wash);
    }
    :host([data-tone='alarm']) {
      border-color: var(--tw-alarm);
      background: var(--tw-alarm-wash);
    }
  `,
})
export class Callout {
  readonly tone = input<'plain' | 'waiting' | 'alarm'>('plain');
}

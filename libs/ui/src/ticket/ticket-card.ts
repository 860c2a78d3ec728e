import { booleanAttribute, ChangeDetectionStrategy, Component, input } from '@angular/core';
import { type Copy } from '../tokens/tokens';

/**
 * The one signature shape: a stub (number, day, amount) torn along a perforation from a body.
 *
 *     <tw-ticket copy="canary">
 *       <div stub> ... </div>
 *       body
 *     </tw-ticket>
 *
 * On a narrow column the stub lies on top. A link of class `tw-stretched` inside makes the whole
 * ticket its target.
 */
@Component({
  selector: 'tw-ticket',
  template: `
    <div class="sheet">
      <div class="stub"><ng-content select="[stub]" /></div>
      <div class="body"><ng-content /></div>
    </div>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: {
    '[attr.data-copy]': 'copy()',
    '[class.tw-ticket--planned]': 'planned()',
    '[class.tw-ticket--alarmed]': 'alarmed()',
    '[class.tw-ticket--wide]': 'wide()',
    '[class.tw-ticket--chosen]': 'chosen()',
  },
  styleUrl: './ticket-card.scss',
})
export class TicketCard {
  /** Which copy's edge it has; none for a small ticket inside another sheet. */
  readonly copy = input<Copy>();
  /** Not yet confirmed: its edge is dotted. */
  readonly planned = input(false, { transform: booleanAttribute });
  /** Something about it needs a person now. */
  readonly alarmed = input(false, { transform: booleanAttribute });
  /** Its body is a table or a form: on a narrow column the stub makes room for it sooner. */
  readonly wide = input(false, { transform: booleanAttribute });
  readonly chosen = input(false, { transform: booleanAttribute });
}

import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { InstantPipe, LoadNote, SectionHead } from '@lib/ui';
import { reloadOn } from '../../core/live/reload-on';
import { DeliveriesApi } from '../deliveries/deliveries-api';
import { DeliveryDecision } from '../deliveries/delivery-decision';
import { deliveryWords, waitsForDecision } from '../deliveries/delivery-words';

/** To whom a statement was mailed, and whether it got there. */
@Component({
  selector: 'tw-statement-mails',
  imports: [DeliveryDecision, InstantPipe, LoadNote, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Mailed to"><ng-content /></tw-section-head>
    @if (mails.hasValue()) {
      @if (mails.value().items.length) {
        <table class="tw-table">
          <thead>
            <tr>
              <th scope="col">Person</th>
              <th scope="col">Address</th>
              <th scope="col">How it stands</th>
              <th scope="col"><span class="tw-unseen">Decide</span></th>
            </tr>
          </thead>
          <tbody>
            @for (mail of mails.value().items; track mail.id) {
              <tr>
                <th scope="row">{{ mail.recipientName || mail.recipient }}</th>
                <td data-label="Address">{{ mail.recipient }}</td>
                <td data-label="How it stands">
                  @if (mail.sentAt; as at) {
                    <span>sent {{ at | twInstant }}</span>
                  } @else {
                    <span [class.alarm]="waitsForDecision(mail.state)">
                      {{ deliveryWords(mail.state) }}
                      @if (mail.lastError; as error) {
                        <span class="tw-soft">({{ error }})</span>
                      }
                    </span>
                  }
                </td>
                <td class="tw-acts">
                  @if (waitsForDecision(mail.state)) {
                    <tw-delivery-decision [delivery]="mail" (decided)="mails.reload()" />
                  }
                </td>
              </tr>
            }
          </tbody>
        </table>
      } @else {
        <p class="tw-soft">
          Nobody. Add a contact of the store who gets statements, then mail it to them.
        </p>
      }
    } @else {
      <tw-load-note [of]="mails" />
    }
  `,
})
export class StatementMails {
  readonly #api = inject(DeliveriesApi);

  readonly statementId = input.required<string>();

  protected readonly deliveryWords = deliveryWords;
  protected readonly waitsForDecision = waitsForDecision;
  protected readonly mails = rxResource({
    params: () => this.statementId(),
    stream: ({ params }) => this.#api.list({ statementId: params, limit: 100 }),
  });

  constructor() {
    reloadOn(this.mails, 'delivery', 'statement-run');
  }

  /** Asks again, e.g. after it was mailed to more people. */
  reload(): void {
    this.mails.reload();
  }
}

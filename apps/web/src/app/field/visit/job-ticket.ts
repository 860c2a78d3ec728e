import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { foundAndDone } from '@lib/domain';
import { labelFor, minutesText, TicketCard, wordFor } from '@lib/ui';
import { type SheetJob } from '../kept/kept';
import { FieldVisit } from '../sheets/field-visit';

/** One job of the visit: machine and minutes on the stub, what was said and found on the body. */
@Component({
  selector: 'tw-job-ticket',
  imports: [RouterLink, TicketCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-ticket [chosen]="!job().doneAt">
      <div stub>
        <span>{{ job().machine.bay }}</span>
        <span class="tw-soft">{{ time() }}</span>
      </div>
      <h3>
        <a class="tw-stretched" [routerLink]="['/field/visits', visit.id, 'jobs', job().id]">
          {{ title() }}
        </a>
      </h3>
      <p class="tw-soft">{{ line() }}</p>
    </tw-ticket>
  `,
  styles: `
    [stub] span {
      display: block;
    }
    h3,
    p {
      margin: 0;
    }
  `,
})
export class JobTicket {
  protected readonly visit = inject(FieldVisit);
  readonly job = input.required<SheetJob>();

  protected readonly title = computed(() => {
    const { symptom } = this.job();
    return symptom ? labelFor(symptom) : 'Not reported';
  });
  protected readonly time = computed(() => {
    const { doneAt, shop } = this.job();
    if (!doneAt) return 'in hand';
    return minutesText(shop?.minutes ?? 0);
  });
  protected readonly line = computed(() => {
    const { finding, action, result } = this.job();
    const said = foundAndDone(finding, action);
    if (result === 'nothing_found') return said || 'Nothing found when tested';
    return said || (result ? labelFor(wordFor(result)) : 'Nothing written yet');
  });
}

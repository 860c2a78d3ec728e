import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import {
  counted,
  labelFor,
  minutesText,
  MoneyText,
  StateMark,
  TicketCard,
  wordFor,
  WordPipe,
} from '@lib/ui';
import { PhotoView } from '../../core/photos/photo-view';
import { type VisitJob as Job } from './visits-api';

/** The work on one machine of a visit, with its proof. */
@Component({
  selector: 'tw-visit-job',
  imports: [MoneyText, PhotoView, RouterLink, StateMark, TicketCard, WordPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-job.html',
  styleUrl: './visit-job.scss',
})
export class VisitJob {
  readonly job = input.required<Job>();
  protected readonly counted = counted;

  protected readonly title = computed(() => {
    const { symptom, findingCode } = this.job();
    if (symptom) return labelFor(symptom);
    return findingCode ? labelFor(findingCode) : 'Worked on';
  });
  /** "35 min, 20 min of them to get at it" */
  protected readonly time = computed(() => {
    const shop = this.job().shop;
    if (!shop) return '';
    return [
      minutesText(shop.minutes),
      shop.accessMinutes ? `${minutesText(shop.accessMinutes)} to get at it` : '',
      shop.afterHoursMinutes ? `${minutesText(shop.afterHoursMinutes)} after hours` : '',
    ]
      .filter(Boolean)
      .join(', ');
  });
  protected readonly result = computed(() => {
    const { result } = this.job();
    return result ? labelFor(wordFor(result)) : 'In hand';
  });

  protected partWords({ quantityMilli, description, source }: Job['parts'][number]): string {
    return `${quantityMilli / 1000} × ${description || 'a part'}, from ${wordFor(source)}`;
  }
}

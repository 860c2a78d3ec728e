import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import {
  Callout,
  counted,
  dayIn,
  dayText,
  LoadNote,
  PageHead,
  Reading,
  SectionHead,
} from '@lib/ui';
import { auditTime } from 'rxjs';
import { Live } from '../../core/live/live';
import { Session } from '../../core/session/session';
import { SetUpBanner } from '../set-up/set-up-banner';
import { NeedList } from './need-list';
import { OpenCalls } from './open-calls';
import { TodayApi } from './today-facts';
import { needsOf } from './today-needs';

/** Many things change on a busy day; the page asks again at most so often. */
const askAgain = 5_000;

/** What needs somebody now, before anything else. */
@Component({
  selector: 'tw-today-page',
  imports: [
    Callout,
    LoadNote,
    MatButton,
    NeedList,
    OpenCalls,
    PageHead,
    RouterLink,
    SectionHead,
    SetUpBanner,
  ],
  templateUrl: './today-page.html',
  styles: `
    .missing {
      display: block;
      margin-block-end: 1rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {
  readonly #api = inject(TodayApi);
  readonly #reading = inject(Reading);
  protected readonly session = inject(Session);

  protected readonly facts = rxResource({ stream: () => this.#api.facts() });
  protected readonly today = computed(() =>
    dayText(dayIn(this.#reading.zone(), new Date()), this.#reading.locale()),
  );
  protected readonly needs = computed(() =>
    this.facts.hasValue()
      ? needsOf(this.facts.value(), {
          locale: this.#reading.locale(),
          currency: this.#reading.currency(),
          today: dayIn(this.#reading.zone(), new Date()),
        })
      : [],
  );
  protected readonly setUpWaits = computed(
    () =>
      this.facts.hasValue() &&
      this.facts.value().shop?.setUpAt === null &&
      this.session.may('settings.change'),
  );
  /** "5 visits by 3 techs" */
  protected readonly dayWords = computed(() => {
    const day = this.facts.hasValue() ? this.facts.value().day : undefined;
    if (!day) return undefined;
    const busy = day.techs.filter(({ visits }) => visits.length > 0);
    const visits = busy.reduce((sum, tech) => sum + tech.visits.length, 0) + day.unplaced.length;
    if (!visits) return 'No visit is planned for today.';
    const by = busy.length ? ` by ${counted(busy.length, 'tech')}` : '';
    return `${counted(visits, 'visit')}${by}.`;
  });
  protected readonly notUpWords = computed(() => {
    const count = this.facts.hasValue() ? (this.facts.value().notUp?.count.value ?? 0) : 0;
    return count ? `${counted(count, 'machine')} not up, over all stores.` : undefined;
  });

  constructor() {
    inject(Live)
      .events.pipe(auditTime(askAgain), takeUntilDestroyed())
      .subscribe(() => this.facts.reload());
  }
}

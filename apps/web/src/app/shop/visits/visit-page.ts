import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { ticketName } from '@lib/domain/words/document-name';
import {
  ClockPipe,
  counted,
  DayPipe,
  InstantPipe,
  labelFor,
  LoadNote,
  PageHead,
  problemText,
  Reading,
  SectionHead,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { VisitActs } from './visit-acts';
import { VisitCancel } from './visit-cancel';
import { VisitJob } from './visit-job';
import { stateWords, windowWords } from './visit-words';
import { type Visit, VisitsApi } from './visits-api';

/** A visit: what it is for, what was done, and what it still needs from the office. */
@Component({
  selector: 'tw-visit-page',
  imports: [
    ClockPipe,
    DayPipe,
    InstantPipe,
    LoadNote,
    MatButton,
    PageHead,
    RouterLink,
    SectionHead,
    VisitActs,
    VisitCancel,
    VisitJob,
  ],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './visit-page.html',
  styles: `
    tw-visit-cancel {
      display: block;
      margin-block-end: 1.5rem;
    }
    ul {
      margin: 0 0 1rem;
      padding: 0;
      list-style: none;
    }
    li {
      padding-block: 0.375rem;
      border-block-end: 1px solid var(--tw-hairline);
      overflow-wrap: anywhere;
    }
    li .tw-soft {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class VisitPage implements HasChanges {
  readonly #api = inject(VisitsApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly visitId = input.required<string>();
  protected readonly visit = rxResource({
    params: () => this.visitId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly cancelling = signal(false);
  protected readonly busy = signal(false);
  protected readonly counted = counted;
  protected readonly stateWords = stateWords;
  protected readonly ticketName = ticketName;
  /** Nobody has begun: it can be moved, confirmed, cancelled. */
  protected readonly planned = computed(() => {
    const state = this.visit.hasValue() ? this.visit.value().state : undefined;
    return state === 'planned' || state === 'confirmed';
  });
  protected readonly mayPlan = computed(() => this.session.mayChange('visits.plan'));

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.visit, 'visit', 'call', 'ruling', 'ticket', 'files');
    effect(() => {
      if (this.visit.hasValue()) this.#titles.name(`Visit ${this.visit.value().number}`);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected heading({ number, store }: Visit): string {
    return `Visit ${number}: ${store.name}`;
  }

  protected windowWords(visit: Visit): string {
    return windowWords(visit, { locale: this.#reading.locale(), zone: this.#reading.zone() });
  }

  protected reportWords({ machine, words, symptom }: Visit['callList'][number]): string {
    return `${machine?.bay ?? 'No machine named'}: ${words || labelFor(symptom)}`;
  }

  protected async confirm(visit: Visit): Promise<void> {
    this.busy.set(true);
    try {
      this.visit.set(await firstValueFrom(this.#api.confirm(visit)));
      this.#messages.say(`${visit.store.name} knows of visit ${visit.number}.`);
    } catch (problem) {
      this.#messages.say(problemText(problem));
      this.visit.reload();
    } finally {
      this.busy.set(false);
    }
  }

  protected cancelled(visit: Visit): void {
    this.cancelling.set(false);
    this.visit.set(visit);
    this.#messages.say(`Visit ${visit.number} was cancelled.`);
  }
}

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
import {
  DayPipe,
  InstantPipe,
  labelFor,
  LabelPipe,
  LoadNote,
  PageHead,
  SectionHead,
  StateMark,
  WordPipe,
} from '@lib/ui';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { CallChange } from './call-change';
import { CallPhotos } from './call-photos';
import { CallProgress } from './call-progress';
import { CallWithdraw } from './call-withdraw';
import { type Call, CallsApi } from './calls-api';

/** A call: what was said, how far it has come, and the way on to a visit. */
@Component({
  selector: 'tw-call-page',
  imports: [
    CallChange,
    CallPhotos,
    CallProgress,
    CallWithdraw,
    DayPipe,
    InstantPipe,
    LabelPipe,
    LoadNote,
    MatButton,
    PageHead,
    RouterLink,
    SectionHead,
    StateMark,
    WordPipe,
  ],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './call-page.html',
  styles: `
    tw-call-change,
    tw-call-withdraw {
      display: block;
      margin-block-end: 1.5rem;
    }
  `,
})
export class CallPage implements HasChanges {
  readonly #api = inject(CallsApi);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly callId = input.required<string>();
  protected readonly call = rxResource({
    params: () => this.callId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly heading = computed(() => {
    if (!this.call.hasValue()) return 'Call';
    const { number, symptom } = this.call.value();
    return `Call ${number}: ${labelFor(symptom)}`;
  });
  protected readonly open = signal<'change' | 'withdraw' | undefined>(undefined);
  protected readonly live = computed(
    () =>
      this.call.hasValue() &&
      (this.call.value().state === 'open' || this.call.value().state === 'planned'),
  );
  protected readonly mayChange = computed(
    () => this.live() && this.session.mayChange('calls.change'),
  );

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.call, 'call', 'visit', 'files');
    effect(() => this.#titles.name(this.heading()));
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  protected changed(call: Call): void {
    this.call.set(call);
    this.open.set(undefined);
    this.#messages.say(`Call ${call.number} was changed.`);
  }

  protected withdrawn(call: Call): void {
    this.call.set(call);
    this.open.set(undefined);
    this.#messages.say(`Call ${call.number} was withdrawn. Nobody goes for it.`);
  }
}

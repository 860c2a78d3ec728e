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
import { PageHead } from '@lib/ui/head/page-head';
import { SectionHead } from '@lib/ui/head/section-head';
import { LoadNote } from '@lib/ui/notes/load-note';
import { problemText } from '@lib/ui/notes/problem-text';
import { TicketCard } from '@lib/ui/ticket/ticket-card';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { NearInstantPipe } from '../near-day';
import { PhotoStrip } from '../visits/photo-strip';
import { CallProgress } from './call-progress';
import { faultText } from './call-words';
import { type Call, type CallPhoto, CallsApi } from './calls-api';
import { PhotoPicker } from './photo-picker';
import { notArrived, SendPhotos } from './send-photos';

/** One reported fault: how far it has come, and its photos. */
@Component({
  selector: 'tw-call-page',
  imports: [
    CallProgress,
    LoadNote,
    MatButton,
    NearInstantPipe,
    PageHead,
    PhotoPicker,
    PhotoStrip,
    RouterLink,
    SectionHead,
    TicketCard,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './call-page.html',
  styles: `
    tw-ticket {
      max-inline-size: 44rem;
    }
    .number {
      display: block;
      font-size: 1.25rem;
      font-weight: 600;
    }
    [stub] a {
      display: block;
    }
    .words {
      overflow-wrap: anywhere;
    }
    p:last-child {
      margin: 0;
    }
    .photos {
      block-size: 4.5rem;
    }
  `,
})
export class CallPage {
  readonly #api = inject(CallsApi);
  readonly #confirm = inject(Confirm);
  readonly #messages = inject(Messages);
  readonly #photos = inject(SendPhotos);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly fault = faultText;

  readonly callId = input.required<string>();

  protected readonly call = rxResource({
    params: () => this.callId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly sending = signal(false);
  protected readonly live = computed(
    () => this.call.hasValue() && ['open', 'planned'].includes(this.call.value().state),
  );
  protected readonly photos = computed(() =>
    this.call.hasValue()
      ? this.call.value().photos.map(({ id }, index) => ({ id, name: `photo ${index + 1}` }))
      : [],
  );

  constructor() {
    reloadOn(this.call, 'call', 'visit', 'files');
    effect(() => {
      if (this.call.hasValue()) this.#titles.name(`Call ${this.call.value().number}`);
    });
  }

  protected sub({ store, reportedBy }: Call): string {
    return `${store.name} · reported by ${reportedBy}`;
  }

  protected async add(photos: readonly CallPhoto[]): Promise<void> {
    this.sending.set(true);
    const failed = await this.#photos.send(this.callId(), photos);
    this.sending.set(false);
    if (failed.length > 0) this.#messages.say(notArrived(failed.length));
    this.call.reload();
  }

  protected async takeBack(call: Call): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: 'Take this call back?',
      consequence: 'The shop plans no visit for it. The call stays in the list as taken back.',
      action: 'Take it back',
    });
    if (!agreed) return;
    try {
      this.call.set(await firstValueFrom(this.#api.withdraw(call)));
      this.#messages.say(`Call ${call.number} was taken back.`);
    } catch (problem) {
      this.#messages.say(problemText(problem));
      this.call.reload();
    }
  }
}

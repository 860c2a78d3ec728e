import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { type AnswerOf } from '@lib/contracts/web';
import { InstantPipe } from '@lib/ui/format/time-pipes';
import { ProblemNote } from '@lib/ui/notes/problem-note';
import { counted } from '@lib/ui/words/words';
import { Api } from '../../core/api/api';
import { type Problem, problemFrom } from '../../core/api/problem';
import { Confirm } from '../../core/confirm/confirm';
import { LocalKeepings } from '../../core/session/leaving';
import { Session } from '../../core/session/session';
import { deviceWords } from './device-words';

/** Where the person is signed in, and the way to end all of it. */
@Component({
  selector: 'tw-devices',
  imports: [InstantPipe, MatButton, ProblemNote],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2>Where you are signed in</h2>
    @if (problem(); as failure) {
      <tw-problem [problem]="failure" (retry)="load()" />
    }
    <ul>
      @for (device of devices(); track device.id) {
        <li>
          <strong>{{ deviceWords(device.device) }}</strong>
          @if (device.current) {
            <span>, this device</span>
          }
          <span class="tw-soft">last used {{ device.lastUsedAt | twInstant }}</span>
        </li>
      }
    </ul>
    <button matButton="outlined" class="tw-destructive" type="button" (click)="endAll()">
      Sign out everywhere
    </button>
  `,
  styles: `
    ul {
      margin: 0 0 1rem;
      padding: 0;
      list-style: none;
    }
    li {
      padding-block: 0.5rem;
      border-block-end: 1px solid var(--tw-hairline);
      overflow-wrap: anywhere;
    }
    strong {
      font-weight: 500;
    }
    .tw-soft {
      display: block;
      font-size: 0.875rem;
    }
  `,
})
export class Devices {
  readonly #api = inject(Api);
  readonly #confirm = inject(Confirm);
  readonly #keepings = inject(LocalKeepings);
  readonly #router = inject(Router);
  readonly #session = inject(Session);

  protected readonly deviceWords = deviceWords;
  protected readonly devices = signal<AnswerOf<'session.list'>['items']>([]);
  protected readonly problem = signal<Problem | undefined>(undefined);

  constructor() {
    this.load();
  }

  protected load(): void {
    this.problem.set(undefined);
    this.#api.call('session.list').subscribe({
      next: ({ items }) => this.devices.set(items),
      error: (problem: Problem) => this.problem.set(problem),
    });
  }

  protected async endAll(): Promise<void> {
    const losses = await this.#keepings.losses();
    const here = `You are signed out on ${counted(this.devices().length, 'device')}, this one too.`;
    const agreed = await this.#confirm.ask({
      heading: 'Sign out everywhere?',
      consequence: [here, ...losses].join(' '),
      action: 'Sign out everywhere',
      stay: 'Stay signed in',
      destructive: true,
    });
    if (!agreed) return;
    try {
      await this.#session.signOut(true);
      await this.#router.navigateByUrl('/sign-in');
    } catch (error) {
      this.problem.set(problemFrom(error));
    }
  }
}

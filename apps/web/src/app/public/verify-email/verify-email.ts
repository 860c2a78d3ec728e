import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ProblemNote } from '@lib/ui/notes/problem-note';
import { Api } from '../../core/api/api';
import { isProblem, type Problem } from '../../core/api/problem';
import { mailedToken } from '../../core/navigation/mailed-token';
import { PlainPage } from '../../core/pages/plain-page';

@Component({
  selector: 'tw-verify-email',
  imports: [PlainPage, ProblemNote, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (confirmed()) {
      <tw-plain-page heading="Your address is confirmed">
        <p>You can sign in now.</p>
        <p><a routerLink="/sign-in">Sign in</a></p>
      </tw-plain-page>
    } @else if (spent()) {
      <tw-plain-page heading="This link no longer works">
        <p>
          It may have been used before, or it has run out. If your address is confirmed already, you
          can <a routerLink="/sign-in">sign in</a>; else <a routerLink="/sign-up">sign up</a> again
          and a fresh link is mailed.
        </p>
      </tw-plain-page>
    } @else {
      <tw-plain-page heading="Confirming your address">
        @if (problem(); as found) {
          <tw-problem [problem]="found" (retry)="confirm()" />
        } @else {
          <p role="status">One moment.</p>
        }
      </tw-plain-page>
    }
  `,
})
export class VerifyEmail {
  readonly #api = inject(Api);
  readonly #token = mailedToken();

  protected readonly confirmed = signal(false);
  protected readonly spent = signal(false);
  protected readonly problem = signal<Problem | undefined>(undefined);

  constructor() {
    this.confirm();
  }

  protected confirm(): void {
    this.problem.set(undefined);
    this.#api.call('account.verifyEmail', { body: { token: this.#token } }).subscribe({
      next: () => this.confirmed.set(true),
      error: (problem: Problem) => {
        // A link cut short by a mail program is as spent as one that was used.
        const known = isProblem(problem, 'not-found') || isProblem(problem, 'invalid-request');
        if (known) this.spent.set(true);
        else this.problem.set(problem);
      },
    });
  }
}

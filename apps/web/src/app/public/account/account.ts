import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  signal,
  viewChild,
} from '@angular/core';
import { type AnswerOf } from '@lib/contracts/web';
import { PageHead } from '@lib/ui/head/page-head';
import { ProblemNote } from '@lib/ui/notes/problem-note';
import { Api } from '../../core/api/api';
import { type Problem } from '../../core/api/problem';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { Devices } from './devices';
import { NameForm } from './name-form';
import { OneTimeCodes } from './one-time-codes';
import { PasswordForm } from './password-form';

@Component({
  selector: 'tw-account',
  imports: [Devices, NameForm, OneTimeCodes, PageHead, PasswordForm, ProblemNote],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head heading="Your account" [sub]="account()?.email" />
    @if (account(); as shown) {
      <div class="tw-pair">
        <tw-name-form
          class="tw-sheet"
          [class.tw-unprinted]="printsCodes()"
          [account]="shown"
          (changed)="load()"
        />
        <tw-password-form
          class="tw-sheet"
          [class.tw-unprinted]="printsCodes()"
          [email]="shown.email"
        />
        @if (shown.oneTimeCodes || shown.oneTimeCodesOffered) {
          <tw-one-time-codes class="tw-sheet" [account]="shown" (changed)="load()" />
        }
        <tw-devices class="tw-sheet" [class.tw-unprinted]="printsCodes()" />
      </div>
    } @else if (problem(); as failure) {
      <tw-problem [problem]="failure" (retry)="load()" />
    } @else {
      <p role="status">Loading your account.</p>
    }
  `,
})
export class Account implements HasChanges {
  readonly #api = inject(Api);
  protected readonly nameForm = viewChild(NameForm);
  protected readonly passwordForm = viewChild(PasswordForm);
  protected readonly codes = viewChild(OneTimeCodes);
  /** While recovery codes are shown, they are what a person prints the page for. */
  protected readonly printsCodes = computed(() => this.codes()?.fresh() !== undefined);

  protected readonly account = signal<AnswerOf<'account.show'> | undefined>(undefined);
  protected readonly problem = signal<Problem | undefined>(undefined);

  constructor() {
    this.load();
    warnBeforeUnload(() => this.hasChanges());
  }

  hasChanges(): boolean {
    return (this.nameForm()?.form.dirty ?? false) || (this.passwordForm()?.form.dirty ?? false);
  }

  protected load(): void {
    this.problem.set(undefined);
    this.#api.call('account.show').subscribe({
      next: (account) => this.account.set(account),
      error: (problem: Problem) => this.problem.set(problem),
    });
  }
}

import { ElementRef, inject, signal } from '@angular/core';
import { type AbstractControl } from '@angular/forms';
import { firstValueFrom, type Observable } from 'rxjs';
import { Intent } from '../api/intent';
import { isProblem, type Problem, problemFrom } from '../api/problem';
import { applyProblem } from './apply-problem';

interface SubmissionOptions<A> {
  done(answer: A): void;
  /** Sees a refusal first; true when it took care of it. */
  refused?(problem: Problem): boolean;
}

/**
 * Sending a form: once at a time, only when it is valid, and under one key for as long as the same
 * thing is meant. Create it where injection is possible:
 *
 *     readonly saving = submission(this.form, (key) => this.#api.call('stores.create', { body, key }), {
 *       done: (store) => ...,
 *     });
 */
export function submission<A>(
  form: AbstractControl,
  send: (key: string) => Observable<A>,
  options: SubmissionOptions<A>,
): Submission<A> {
  return new Submission(form, send, options, inject<ElementRef<HTMLElement>>(ElementRef));
}

export class Submission<A> {
  readonly busy = signal(false);
  /** What went wrong and has no field of its own, for a note above the form. */
  readonly notes = signal<readonly string[]>([]);
  readonly #intent = new Intent();
  readonly #form: AbstractControl;
  readonly #send: (key: string) => Observable<A>;
  readonly #options: SubmissionOptions<A>;
  readonly #host: ElementRef<HTMLElement>;

  constructor(
    form: AbstractControl,
    send: (key: string) => Observable<A>,
    options: SubmissionOptions<A>,
    host: ElementRef<HTMLElement>,
  ) {
    this.#form = form;
    this.#send = send;
    this.#options = options;
    this.#host = host;
  }

  async submit(): Promise<void> {
    if (this.busy()) return;
    this.notes.set([]);
    this.#form.markAllAsTouched();
    if (this.#form.invalid) {
      this.#toFirstError();
      return;
    }
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(this.#send(this.#intent.key), {
        defaultValue: undefined as A,
      });
      this.#intent.renew();
      this.#form.markAsPristine();
      this.#options.done(answer);
    } catch (error) {
      this.#refuse(isProblem(error) ? error : problemFrom(error));
    } finally {
      this.busy.set(false);
    }
  }

  #refuse(problem: Problem): void {
    // After an answer, what is sent next is something else; without one, it is the same again.
    if (!problem.unanswered) this.#intent.renew();
    if (this.#options.refused?.(problem)) return;
    this.notes.set(applyProblem(this.#form, problem));
    if (this.#form.invalid) this.#toFirstError();
  }

  #toFirstError(): void {
    // After the change is drawn, so that the field is read out together with its error.
    setTimeout(() => {
      const fields = 'input.ng-invalid, select.ng-invalid, textarea.ng-invalid';
      const first = this.#host.nativeElement.querySelector<HTMLElement>(
        `${fields}, .ng-invalid:not(form, fieldset, [formGroupName]) input`,
      );
      first?.focus();
    });
  }
}

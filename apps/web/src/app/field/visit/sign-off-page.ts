import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { Callout, counted, minutesText, PageHead, TextField, wordFor } from '@lib/ui';
import { Messages } from '../../core/messages/messages';
import { OutboxLine } from '../outbox/outbox-line';
import { FieldVisit } from '../sheets/field-visit';

/** The end of a visit: everything that was done, once more, and who received it. */
@Component({
  selector: 'tw-sign-off-page',
  imports: [Callout, MatButton, OutboxLine, PageHead, ReactiveFormsModule, RouterLink, TextField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sign-off-page.html',
  styleUrl: './sign-off-page.scss',
})
export class SignOffPage {
  readonly #router = inject(Router);
  readonly #messages = inject(Messages);
  protected readonly visit = inject(FieldVisit);

  protected readonly form = new FormGroup({
    receivedBy: new FormControl('', {
      nonNullable: true,
      validators: [Validators.maxLength(120)],
    }),
  });
  protected readonly jobs = computed(() =>
    (this.visit.sheet()?.jobs ?? []).map((job) => ({
      id: job.id,
      bay: job.machine.bay,
      done: job.doneAt !== null,
      words: job.result ? wordFor(job.result) : 'no result yet',
      state: job.machineState ? wordFor(job.machineState) : '',
      minutes: minutesText((job.shop?.minutes ?? 0) + (job.shop?.accessMinutes ?? 0)),
    })),
  );
  protected readonly unfinished = computed(() => this.jobs().filter(({ done }) => !done));
  protected readonly untouched = computed(() => {
    const sheet = this.visit.sheet();
    const worked = new Set(sheet?.jobs.flatMap(({ callId, machine }) => [callId, machine.id]));
    return (sheet?.calls ?? [])
      .filter(({ id, machine }) => !worked.has(id) && !worked.has(machine?.id ?? null))
      .map(
        ({ machine, symptom, words }) =>
          `${machine?.bay ?? 'A machine'}: ${words || wordFor(symptom)}`,
      );
  });

  protected async signOff(): Promise<void> {
    if (this.form.invalid || this.unfinished().length > 0) return;
    const receivedBy = this.form.getRawValue().receivedBy.trim();
    await this.visit.arrive();
    await this.visit.record('left', {});
    await this.visit.record('signed_off', { receivedBy: receivedBy || null });
    const sheet = this.visit.sheet();
    this.#messages.say(
      `${sheet?.visit.store.name ?? 'The visit'} is signed off with ${counted(this.jobs().length, 'machine')}.`,
    );
    await this.#router.navigateByUrl('/field/day');
  }
}

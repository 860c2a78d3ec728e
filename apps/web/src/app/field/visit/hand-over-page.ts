import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { PageHead, SelectField, WordsField } from '@lib/ui';
import { v7 } from 'uuid';
import { Messages } from '../../core/messages/messages';
import { FieldVisit } from '../sheets/field-visit';

/** What the next tech must do here: they see it first. */
@Component({
  selector: 'tw-hand-over-page',
  imports: [MatButton, PageHead, ReactiveFormsModule, SelectField, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-page-head
      heading="Hand over"
      sub="The next tech sees this before anything else."
      [upLink]="['/field/visits', visit.id]"
      [upLabel]="visit.sheet()?.visit?.store?.name ?? 'Visit'"
    />
    <form class="tw-form" [formGroup]="form" (ngSubmit)="save()">
      <tw-select-field
        label="Machine"
        [control]="form.controls.machineId"
        [options]="machines()"
        none="The store as a whole"
      />
      <tw-words-field
        label="What is left to do"
        [control]="form.controls.words"
        hint="What to bring, what was tried, whom to ask."
      />
      <div class="actions">
        <button matButton="filled" type="submit">Hand over</button>
      </div>
    </form>
  `,
})
export class HandOverPage {
  readonly #router = inject(Router);
  readonly #messages = inject(Messages);
  protected readonly visit = inject(FieldVisit);

  protected readonly form = new FormGroup({
    machineId: new FormControl('', { nonNullable: true }),
    words: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.maxLength(500)],
    }),
  });
  protected readonly machines = computed(
    () =>
      this.visit.sheet()?.machines.map(({ id, bay, make, model }) => ({
        value: id,
        label: `${bay} ${make} ${model}`.trim(),
      })) ?? [],
  );

  hasChanges(): boolean {
    return this.form.dirty;
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    const { machineId, words } = this.form.getRawValue();
    if (this.form.invalid || words.trim() === '') return;
    await this.visit.record('handed_over', {
      openItemId: v7(),
      machineId: machineId || null,
      words: words.trim(),
    });
    this.form.markAsPristine();
    this.#messages.say('The next tech will see it first.');
    await this.#router.navigate(['/field/visits', this.visit.id]);
  }
}

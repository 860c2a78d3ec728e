import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { FormNotes, SectionHead, TextField, WordsField } from '@lib/ui';
import { changedValues } from '../../core/forms/changed-values';
import { rulesFor } from '../../core/forms/rules-for';
import { type ShopSettings } from './settings-api';
import { SettingsPart } from './settings-part';

/** Who the shop is, as its tickets, statements and mails say it. */
@Component({
  selector: 'tw-shop-form',
  imports: [FormNotes, MatButton, ReactiveFormsModule, SectionHead, TextField, WordsField],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="The shop" sub="As tickets, statements and mails say it." />
    <form class="tw-form" novalidate [formGroup]="form" (ngSubmit)="submitting.submit()">
      <tw-form-notes [notes]="submitting.notes()" />
      <tw-text-field label="Name" [control]="form.controls.name" autocomplete="organization" />
      <tw-words-field label="Address" [control]="form.controls.address" />
      <div class="beside">
        <tw-text-field
          label="Telephone"
          type="tel"
          [control]="form.controls.phone"
          hint="Like +1 555 0100"
        />
        <tw-text-field label="Tax number" [control]="form.controls.taxNumber" />
      </div>
      <div class="beside">
        <tw-text-field
          label="Mails come from"
          [control]="form.controls.mailName"
          hint="Empty: the name of the shop"
        />
        <tw-text-field
          label="Answers go to"
          type="email"
          [control]="form.controls.replyTo"
          hint="An address somebody reads"
        />
      </div>
      @if (mayChange()) {
        <div class="actions">
          <button
            matButton="filled"
            type="submit"
            [disabled]="submitting.busy()"
            disabledInteractive
          >
            Save the shop’s data
          </button>
        </div>
      }
    </form>
  `,
})
export class ShopForm extends SettingsPart {
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', rulesFor('shop.change', 'name')],
    address: ['', rulesFor('shop.change', 'address')],
    phone: ['', rulesFor('shop.change', 'phone')],
    taxNumber: ['', rulesFor('shop.change', 'taxNumber')],
    mailName: ['', rulesFor('shop.change', 'mailName')],
    replyTo: ['', rulesFor('shop.change', 'replyTo')],
  });

  protected readonly submitting = this.saving(
    this.form,
    () => {
      const { replyTo, ...changed } = changedValues(this.form);
      return { ...changed, ...(replyTo === undefined ? {} : { replyTo: replyTo || null }) };
    },
    ({ name }) => `${name} is written like this on everything from now on.`,
  );

  protected override valuesOf(settings: ShopSettings): object {
    return { ...settings, replyTo: settings.replyTo ?? '' };
  }
}

import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, Validators } from '@angular/forms';
import { Reading } from '../format/reading';
import { AmountField } from './amount-field';
import { CheckField } from './check-field';
import { DistanceField } from './distance-field';
import { NumberField } from './number-field';
import { PercentField } from './percent-field';
import { SelectField } from './select-field';
import { TextField } from './text-field';
import { WordsField } from './words-field';

@Component({
  selector: 'tw-fields-host',
  imports: [
    AmountField,
    CheckField,
    DistanceField,
    NumberField,
    PercentField,
    SelectField,
    TextField,
    WordsField,
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-text-field label="Name" [control]="name" [suggestions]="['Foxglove Lane']" />
    <tw-words-field label="Note" [control]="note" hint="Only the shop sees it" />
    <tw-amount-field label="Cost" [control]="cost" />
    <tw-percent-field label="Markup" [control]="markup" />
    <tw-percent-field class="fine" label="Tax" fine [control]="tax" />
    <tw-distance-field label="How far" [control]="metres" />
    <tw-number-field label="Volts" unit="V" [control]="volts" />
    <tw-select-field label="Place" none="Anywhere" [options]="places" [control]="place" />
    <tw-check-field label="Scarce" [control]="scarce" />
  `,
})
class FieldsHost {
  readonly name = new FormControl('', { nonNullable: true, validators: Validators.required });
  readonly note = new FormControl('', { nonNullable: true });
  readonly cost = new FormControl<number | null>(1250);
  readonly markup = new FormControl<number | null>(4000);
  readonly tax = new FormControl<number | null>(0);
  readonly metres = new FormControl<number | null>(16093);
  readonly volts = new FormControl<number | null>(120);
  readonly place = new FormControl('', { nonNullable: true });
  readonly scarce = new FormControl(false, { nonNullable: true });
  readonly places = [{ value: 'town', label: 'Town' }];

  constructor() {
    const reading = inject(Reading);
    reading.currency.set('USD');
    reading.locale.set('en-US');
  }
}

async function host() {
  const fixture = TestBed.createComponent(FieldsHost);
  await fixture.whenStable();
  const root = fixture.nativeElement as HTMLElement;
  const field = (selector: string) => {
    const found = root.querySelector<HTMLInputElement>(`${selector} input, ${selector} select`);
    if (!found) throw new Error(`no ${selector}`);
    return found;
  };
  const type = async (selector: string, text: string) => {
    field(selector).value = text;
    field(selector).dispatchEvent(new Event('input'));
    field(selector).dispatchEvent(new Event('blur'));
    await fixture.whenStable();
  };
  return { fixture, form: fixture.componentInstance, root, field, type };
}

describe('fields', () => {
  it('show what the form holds as people write it', async () => {
    const { field } = await host();
    expect(field('tw-amount-field').value).toBe('12.50');
    expect(field('tw-percent-field').value).toBe('40');
    expect(field('tw-distance-field').value).toBe('10');
    expect(field('tw-number-field').value).toBe('120');
  });

  it('give the form whole small units', async () => {
    const { form, type } = await host();
    await type('tw-amount-field', '96,5');
    await type('tw-percent-field', '8.25');
    await type('tw-distance-field', '');
    expect([form.cost.value, form.markup.value, form.metres.value]).toEqual([9650, 825, null]);
  });

  it('write an amount out when it is left', async () => {
    const { field, type } = await host();
    await type('tw-amount-field', '7');
    expect(field('tw-amount-field').value).toBe('7.00');
  });

  it('keep what cannot be read, and say what is expected', async () => {
    const { form, field, root, type } = await host();
    await type('tw-amount-field', '12.345');
    expect(field('tw-amount-field').value).toBe('12.345');
    expect(form.cost.invalid).toBe(true);
    expect(root.textContent).toContain('Write an amount like 12.50.');
  });

  it('take parts of a basis point only where that is asked for', async () => {
    const { form, type } = await host();
    await type('tw-percent-field', '8.875');
    expect(form.markup.errors).toEqual({ measure: 'Write a rate like 8.25.' });
    await type('tw-percent-field.fine', '8.875');
    expect(form.tax.value).toBe(887.5);
  });

  it('show an error once the field was touched, also from outside', async () => {
    const { fixture, form, root } = await host();
    expect(root.textContent).not.toContain('Fill this in.');
    form.name.markAsTouched();
    await fixture.whenStable();
    expect(root.textContent).toContain('Fill this in.');
  });

  it('offer what was written before', async () => {
    const { field, root } = await host();
    const list = root.querySelector(`#${field('tw-text-field').getAttribute('list')}`);
    expect(list?.querySelector('option')?.value).toBe('Foxglove Lane');
  });

  it('are switched off with their control', async () => {
    const { form, field } = await host();
    form.cost.disable();
    expect(field('tw-amount-field').disabled).toBe(true);
  });
});

import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { ChoiceChips } from './choice-chips';
import { CountStepper } from './count-stepper';

@Component({
  selector: 'tw-choices-host',
  imports: [ChoiceChips, CountStepper, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-choices class="cause" legend="Cause" [choices]="causes" [formControl]="cause" />
    <tw-choices class="days" legend="Days" [choices]="causes" many [formControl]="several" />
    <tw-count label="Coins put in" [max]="9" [formControl]="coins" />
  `,
})
class ChoicesHost {
  readonly causes = [
    { value: 'wear', label: 'Wear' },
    { value: 'misuse', label: 'Misuse' },
  ];
  readonly cause = new FormControl<string | null>('wear');
  readonly several = new FormControl<readonly string[]>([]);
  readonly coins = new FormControl(8);
}

async function host() {
  const fixture = TestBed.createComponent(ChoicesHost);
  await fixture.whenStable();
  const root = fixture.nativeElement as HTMLElement;
  const inputs = (part: string) => [...root.querySelectorAll<HTMLInputElement>(`${part} input`)];
  return { fixture, form: fixture.componentInstance, root, inputs };
}

describe('ChoiceChips', () => {
  it('shows and changes one of few', async () => {
    const { fixture, form, inputs, root } = await host();
    expect(inputs('.cause').map((input) => input.checked)).toEqual([true, false]);
    inputs('.cause')[1]?.click();
    await fixture.whenStable();
    expect(form.cause.value).toBe('misuse');
    expect(root.querySelectorAll('.cause .chosen')).toHaveLength(1);
  });

  it('collects several, and lets go of them', async () => {
    const { fixture, form, inputs } = await host();
    inputs('.days')[0]?.click();
    inputs('.days')[1]?.click();
    inputs('.days')[0]?.click();
    await fixture.whenStable();
    expect(form.several.value).toEqual(['misuse']);
  });

  it('can be switched off', async () => {
    const { fixture, form, root } = await host();
    form.cause.disable();
    await fixture.whenStable();
    expect(root.querySelector<HTMLFieldSetElement>('.cause fieldset')?.disabled).toBe(true);
  });
});

describe('CountStepper', () => {
  it('counts up and down within its limits', async () => {
    const { fixture, form, root } = await host();
    const [less, more] = [...root.querySelectorAll<HTMLButtonElement>('tw-count button')];
    more?.click();
    more?.click();
    await fixture.whenStable();
    expect(form.coins.value).toBe(9);
    expect(more?.disabled).toBe(true);
    less?.click();
    expect(form.coins.value).toBe(8);
  });

  it('takes a typed number and refuses what is none', async () => {
    const { form, inputs } = await host();
    const [field] = inputs('tw-count');
    if (!field) throw new Error('no field');
    field.value = '4';
    field.dispatchEvent(new Event('change'));
    expect(form.coins.value).toBe(4);
    field.value = '-3';
    field.dispatchEvent(new Event('change'));
    expect(form.coins.value).toBe(4);
    expect(field.value).toBe('4');
  });
});

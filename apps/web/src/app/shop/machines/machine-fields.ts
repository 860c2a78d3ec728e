import { FormControl, type ValidatorFn } from '@angular/forms';
import { energies, machineKinds } from '@lib/contracts/generated/values';
import { type Energy, type MachineKind } from '@lib/contracts/web';
import { choicesOf } from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';

export const kindChoices = choicesOf(machineKinds);

export const energyChoices = choicesOf(energies);

function control<T>(value: T, validators: ValidatorFn[] = []): FormControl<T> {
  return new FormControl(value, { nonNullable: true, validators });
}

/** The controls of what machines of one model share, for a form to hold beside its own. */
export function modelControls() {
  const rules = (field: Parameters<typeof rulesFor<'machines.create'>>[1]) =>
    rulesFor('machines.create', field);
  return {
    kind: control<MachineKind>('top_loader', rules('kind')),
    energy: control<Energy>('electric', rules('energy')),
    make: control('', rules('make')),
    model: control('', rules('model')),
    volts: control<number | null>(null, rules('volts')),
    amps: control<number | null>(null, rules('amps')),
    vendPrice: control<number | null>(0, rules('vendPrice')),
    cyclesADay: control<number | null>(0, rules('cyclesADay')),
    builtOn: control(''),
    installedOn: control(''),
    supplierWarrantyUntil: control(''),
  };
}

export type ModelControls = ReturnType<typeof modelControls>;

interface FieldValues {
  vendPrice?: number | null;
  cyclesADay?: number | null;
  builtOn?: string;
  installedOn?: string;
  supplierWarrantyUntil?: string;
}

type AsSent<V> = {
  [K in keyof V]: K extends 'vendPrice' | 'cyclesADay'
    ? number
    : K extends 'builtOn' | 'installedOn' | 'supplierWarrantyUntil'
      ? string | null
      : V[K];
};

/** As the API takes them: days left empty are not known, counts left empty are none. */
export function modelBody<V extends FieldValues>(values: V): AsSent<V> {
  const body = { ...values } as Record<string, unknown>;
  for (const day of ['builtOn', 'installedOn', 'supplierWarrantyUntil'] as const) {
    if (day in values) body[day] = values[day] || null;
  }
  for (const count of ['vendPrice', 'cyclesADay'] as const) {
    if (count in values) body[count] = values[count] ?? 0;
  }
  return body as AsSent<V>;
}

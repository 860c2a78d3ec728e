import {
  type FormArray,
  type FormControl,
  type FormGroup,
  type NonNullableFormBuilder,
  Validators,
} from '@angular/forms';
import { machineKinds } from '@lib/contracts/generated/values';
import { type MachineKind } from '@lib/contracts/web';
import { type Choice, choicesOf } from '@lib/ui';
import { rulesFor } from '../../core/forms/rules-for';
import { type Contract, type Terms } from './contracts-api';
import { ruleOf, usualRule } from './rule-values';

export const kinds = choicesOf(machineKinds);

export const shifts: readonly Choice<Contract['shift']>[] = [
  { value: 'next', label: 'It comes on the next open day' },
  { value: 'previous', label: 'It comes on the open day before' },
  { value: 'none', label: 'It comes all the same' },
];

interface StoreControls {
  storeId: FormControl<string>;
  monthlyFee: FormControl<number | null>;
}

/** The terms of a contract as a form; its fields are named as the API names them. */
export function contractForm(build: NonNullableFormBuilder, startsOn: string) {
  const stores: FormArray<FormGroup<StoreControls>> = build.array<FormGroup<StoreControls>>(
    [],
    Validators.required,
  );
  const form = build.group({
    clientId: ['', Validators.required],
    name: ['', rulesFor('contracts.create', 'name')],
    rule: [ruleOf(usualRule), rulesFor('contracts.create', 'rule')],
    startsOn: [startsOn, Validators.required],
    endsOn: [''],
    startTime: ['09:00', Validators.required],
    shift: ['next' as Contract['shift']],
    coverage: build.group({
      labour: [true],
      parts: [false],
      trip: [true],
      kinds: [[] as readonly MachineKind[]],
    }),
    techMembershipId: [''],
    stores,
  });
  const addStore = (storeId: string, monthlyFee: number | null) =>
    stores.push(
      build.group({
        storeId: [storeId],
        monthlyFee: [monthlyFee, [Validators.required, Validators.min(0)]],
      }),
    );
  const fillStores = (agreed: Contract['storeList']) => {
    stores.clear();
    for (const { storeId, monthlyFee } of agreed) addStore(storeId, monthlyFee);
  };
  return Object.assign(form, { addStore, fillStores });
}

type Values = ReturnType<ReturnType<typeof contractForm>['getRawValue']>;

/** What is sent of the form: what is empty there is null in the terms. */
export function termsOf({ clientId: _, ...values }: Values): Terms {
  const { coverage, endsOn, startTime, techMembershipId, stores, ...rest } = values;
  return {
    ...rest,
    // Some browsers write seconds too.
    startTime: startTime.slice(0, 5),
    endsOn: endsOn || null,
    techMembershipId: techMembershipId || null,
    coverage: { ...coverage, kinds: [...coverage.kinds] },
    stores: stores.map(({ storeId, monthlyFee }) => ({ storeId, monthlyFee: monthlyFee ?? 0 })),
  };
}

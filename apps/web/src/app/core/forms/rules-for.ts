import { type ValidatorFn, Validators } from '@angular/forms';
import { type FieldRule, formRules } from '@lib/contracts/generated/form-rules';
import { type BodyOf, type OperationId } from '@lib/contracts/web';

type FieldOf<Id extends OperationId> = keyof BodyOf<Id> & string;

/**
 * The validators of a field as the contract states them, so that a form refuses what the server
 * would refuse, and nothing else: `rulesFor('stores.create', 'name')`.
 */
export function rulesFor<Id extends OperationId>(id: Id, field: FieldOf<Id>): ValidatorFn[] {
  const rule = formRules[id]?.[field];
  if (!rule) throw new Error(`The contract of ${id} has no field "${field}"`);
  return validatorsOf(rule, field === 'email');
}

function validatorsOf(rule: FieldRule, isAddress: boolean): ValidatorFn[] {
  return [
    ...(rule.required ? [Validators.required] : []),
    ...(rule.minLength ? [Validators.minLength(rule.minLength)] : []),
    ...(rule.maxLength !== undefined ? [Validators.maxLength(rule.maxLength)] : []),
    ...(rule.min !== undefined ? [Validators.min(rule.min)] : []),
    ...(rule.max !== undefined ? [Validators.max(rule.max)] : []),
    ...(rule.pattern ? [Validators.pattern(new RegExp(rule.pattern, 'u'))] : []),
    ...(rule.email || isAddress ? [Validators.email] : []),
  ];
}

import { type AbstractControl } from '@angular/forms';
import { type Problem } from '../api/problem';

/**
 * Shows what the server refused at the fields it names, keeping what was typed. Answers what found
 * no field, to be shown above the form.
 */
export function applyProblem(form: AbstractControl, problem: Problem): string[] {
  const unplaced = problem.errors.filter(({ pointer, detail, in: where }) => {
    const control = where && where !== 'body' ? null : controlAt(form, pointer);
    if (!control || control === form) return true;
    // Gone with the next change of the value, since validation then runs anew.
    control.setErrors({ ...control.errors, server: detail });
    control.markAsTouched();
    return false;
  });
  if (problem.errors.length === 0) return [problem.detail ?? problem.title];
  return unplaced.map(({ detail }) => detail);
}

/** `/lines/0/amount` in a form of groups and arrays (RFC 6901). */
function controlAt(form: AbstractControl, pointer: string): AbstractControl | null {
  const steps = pointer
    .split('/')
    .slice(1)
    .map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
  let at: AbstractControl | null = form;
  for (const step of steps) {
    const next: AbstractControl | null =
      at?.get([/^\d+$/.test(step) ? Number(step) : step]) ?? null;
    // A pointer into a value that one field holds belongs to that field.
    if (!next) return at === form ? null : at;
    at = next;
  }
  return at;
}

import { FormArray, FormControl, FormGroup } from '@angular/forms';
import { type FieldError } from '@lib/contracts/web';
import { Problem } from '../api/problem';
import { applyProblem } from './apply-problem';
import { rulesFor } from './rules-for';

const refused = (errors: FieldError[]) =>
  new Problem('invalid-request', 422, 'Some values are not right', undefined, errors);

describe('rulesFor', () => {
  it('refuses what the contract refuses', () => {
    const name = new FormControl('', rulesFor('account.change', 'name'));
    expect(name.hasError('required')).toBe(true);
    name.setValue('x'.repeat(121));
    expect(name.hasError('maxlength')).toBe(true);
    name.setValue('Noor');
    expect(name.valid).toBe(true);

    const email = new FormControl('not an address', rulesFor('session.signIn', 'email'));
    expect(email.hasError('email')).toBe(true);

    const currency = new FormControl('usd', rulesFor('shops.signUp', 'currency'));
    expect(currency.hasError('pattern')).toBe(true);
  });

  it('lets a field be empty that may be', () => {
    expect(new FormControl('', rulesFor('session.signIn', 'code')).valid).toBe(true);
  });

  it('knows a misspelt field at once', () => {
    expect(() => rulesFor('account.change', 'nmae' as 'name')).toThrow('no field "nmae"');
  });
});

describe('applyProblem', () => {
  const form = () =>
    new FormGroup({
      name: new FormControl('Foxglove Lane'),
      'hours/day': new FormControl('8'),
      lines: new FormArray([new FormGroup({ amount: new FormControl(1) })]),
    });

  it('shows each error at its field and keeps what was typed', () => {
    const shown = form();
    const rest = applyProblem(
      shown,
      refused([
        { pointer: '/name', detail: 'is taken' },
        { pointer: '/lines/0/amount', detail: 'is too much' },
        { pointer: '/hours~1day', detail: 'is no number' },
      ]),
    );
    expect(rest).toEqual([]);
    expect(shown.controls.name.errors).toEqual({ server: 'is taken' });
    expect(shown.controls.name.touched).toBe(true);
    expect(shown.get(['lines', 0, 'amount'])?.errors).toEqual({ server: 'is too much' });
    expect(shown.controls['hours/day'].errors).toEqual({ server: 'is no number' });
    expect(shown.value.name).toBe('Foxglove Lane');
  });

  it('lets the error go with the next change', () => {
    const shown = form();
    applyProblem(shown, refused([{ pointer: '/name', detail: 'is taken' }]));
    shown.controls.name.setValue('Quay 9');
    expect(shown.valid).toBe(true);
  });

  it('gives back what no field carries', () => {
    const rest = applyProblem(
      form(),
      refused([
        { pointer: '/zone', detail: 'is not a time zone' },
        { pointer: '/name', in: 'query', detail: 'is not asked here' },
      ]),
    );
    expect(rest).toEqual(['is not a time zone', 'is not asked here']);
  });

  it('puts an error inside a value at the field that holds it', () => {
    const shown = form();
    applyProblem(shown, refused([{ pointer: '/name/first', detail: 'is odd' }]));
    expect(shown.controls.name.errors).toEqual({ server: 'is odd' });
  });

  it('says a problem without fields in its own words', () => {
    const conflict = new Problem('conflict', 409, 'Does not go together', 'Bay A-04 is taken.');
    expect(applyProblem(form(), conflict)).toEqual(['Bay A-04 is taken.']);
  });
});

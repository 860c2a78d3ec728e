import { TestBed } from '@angular/core/testing';
import { FormControl, Validators } from '@angular/forms';
import { errorText, FieldError } from './field-error';

describe('field errors', () => {
  it.each([
    [null, ''],
    [{ required: true }, 'Fill this in.'],
    [{ email: true }, 'Write an address like name@example.com.'],
    [{ minlength: { requiredLength: 8 } }, 'Write at least 8 characters.'],
    [{ maxlength: { requiredLength: 120 } }, 'Write at most 120 characters.'],
    [{ min: { min: 1 } }, 'At least 1.'],
    [{ max: { max: 60 } }, 'At most 60.'],
    [{ pattern: { requiredPattern: '^x$' } }, 'This is not in the form that is expected.'],
    [{ server: 'is taken already' }, 'Is taken already.'],
  ])('says %j', (errors, text) => {
    expect(errorText(errors)).toBe(text);
  });

  it('follows the control', async () => {
    const control = new FormControl('', Validators.required);
    const fixture = TestBed.createComponent(FieldError);
    fixture.componentRef.setInput('control', control);
    await fixture.whenStable();
    const host = fixture.nativeElement as HTMLElement;
    expect(host.textContent).toBe('Fill this in.');
    control.setErrors({ server: 'no such bay' });
    await fixture.whenStable();
    expect(host.textContent).toBe('No such bay.');
  });
});

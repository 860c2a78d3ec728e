import { ReactiveFormsModule } from '@angular/forms';
import { MatError, MatFormField, MatHint, MatLabel, MatSuffix } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { FieldError } from '../choices/field-error';

/** What every field is put together from. */
export const fieldParts = [
  FieldError,
  MatError,
  MatFormField,
  MatHint,
  MatInput,
  MatLabel,
  MatSuffix,
  ReactiveFormsModule,
] as const;

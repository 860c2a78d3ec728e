import { DestroyRef, inject, Injectable } from '@angular/core';
import { type AbstractControl } from '@angular/forms';

/**
 * The forms that stand open inside a page, for its guard against leaving with unsaved changes. A
 * page of several sections provides it; each form that opens in a section says `follow(this.form)`.
 */
@Injectable()
export class OpenForms {
  readonly #forms = new Set<AbstractControl>();

  /** Call it where injection is possible. */
  follow(form: AbstractControl): void {
    this.#forms.add(form);
    inject(DestroyRef).onDestroy(() => this.#forms.delete(form));
  }

  hasChanges(): boolean {
    return [...this.#forms].some((form) => form.dirty);
  }
}

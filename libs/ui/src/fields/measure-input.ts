import { Directive, ElementRef, forwardRef, inject, type Provider, type Type } from '@angular/core';
import {
  type ControlValueAccessor,
  NG_VALIDATORS,
  NG_VALUE_ACCESSOR,
  type ValidationErrors,
  type Validator,
} from '@angular/forms';

/** What a directive that reads a measure must provide to stand on a form control. */
export function measureProviders(directive: () => Type<unknown>): Provider[] {
  return [NG_VALUE_ACCESSOR, NG_VALIDATORS].map((provide) => ({
    provide,
    useExisting: forwardRef(directive),
    multi: true,
  }));
}

/**
 * A text field whose value is a whole number in a small unit (cents, basis points, metres), while
 * people write it in a large one. What cannot be read keeps standing, with words of what is expected.
 */
@Directive({
  host: {
    inputmode: 'decimal',
    autocomplete: 'off',
    '(input)': 'read($event)',
    '(blur)': 'leave()',
  },
})
export abstract class MeasureInput implements ControlValueAccessor, Validator {
  readonly #element = inject<ElementRef<HTMLInputElement>>(ElementRef).nativeElement;
  #value: number | null = null;
  #unreadable = false;
  #changed: (value: number | null) => void = () => undefined;
  #touched: () => void = () => undefined;

  /** The value of what was typed, which is not empty; undefined when it cannot be read. */
  protected abstract valueOf(text: string): number | undefined;
  protected abstract textOf(value: number): string;
  /** "Write an amount like 12.50." */
  protected abstract expected(): string;

  protected read(event: Event): void {
    const text = (event.target as HTMLInputElement).value.trim();
    const value = text === '' ? null : this.valueOf(text);
    this.#unreadable = value === undefined;
    this.#value = value ?? null;
    this.#changed(this.#value);
  }

  protected leave(): void {
    if (!this.#unreadable) this.#show();
    this.#touched();
  }

  writeValue(value: number | null | undefined): void {
    this.#value = value ?? null;
    this.#unreadable = false;
    this.#show();
  }

  validate(): ValidationErrors | null {
    return this.#unreadable ? { measure: this.expected() } : null;
  }

  registerOnChange(changed: (value: number | null) => void): void {
    this.#changed = changed;
  }

  registerOnTouched(touched: () => void): void {
    this.#touched = touched;
  }

  setDisabledState(disabled: boolean): void {
    this.#element.disabled = disabled;
  }

  #show(): void {
    this.#element.value = this.#value === null ? '' : this.textOf(this.#value);
  }
}

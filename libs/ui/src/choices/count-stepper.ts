import { ChangeDetectionStrategy, Component, forwardRef, input, signal } from '@angular/core';
import { type ControlValueAccessor, NG_VALUE_ACCESSOR } from '@angular/forms';

let steppers = 0;

/** A small whole number for a thumb: test cycles, coins, pieces. It can also be typed. */
@Component({
  selector: 'tw-count',
  changeDetection: ChangeDetectionStrategy.OnPush,
  providers: [
    { provide: NG_VALUE_ACCESSOR, useExisting: forwardRef(() => CountStepper), multi: true },
  ],
  template: `
    <label [for]="id">{{ label() }}</label>
    <span class="parts">
      <button
        type="button"
        [attr.aria-label]="'Less: ' + label()"
        [disabled]="disabled() || value() <= min()"
        (click)="set(value() - step())"
      >
        <span aria-hidden="true">&minus;</span>
      </button>
      <input
        inputmode="numeric"
        autocomplete="off"
        [id]="id"
        [value]="value()"
        [disabled]="disabled()"
        (change)="typed($event)"
        (blur)="touched()"
      />
      <button
        type="button"
        [attr.aria-label]="'More: ' + label()"
        [disabled]="disabled() || value() >= max()"
        (click)="set(value() + step())"
      >
        <span aria-hidden="true">+</span>
      </button>
    </span>
  `,
  styles: `
    :host {
      display: flex;
      align-items: center;
      justify-content: space-between;
      gap: 1rem;
    }
    .parts {
      display: flex;
    }
    button,
    input {
      inline-size: max(var(--tw-touch), 2.5rem);
      block-size: max(var(--tw-touch), 2.5rem);
      padding: 0;
      border: 1px solid var(--tw-field-line);
      background: var(--tw-sheet);
      color: var(--tw-ink);
      font: inherit;
      text-align: center;
    }
    input {
      inline-size: 3.5rem;
      border-inline: 0;
      font-weight: 600;
      font-variant-numeric: tabular-nums;
    }
    button {
      cursor: pointer;
      font-size: 1.25rem;
    }
    button:first-of-type {
      border-radius: 0.25rem 0 0 0.25rem;
    }
    button:last-of-type {
      border-radius: 0 0.25rem 0.25rem 0;
    }
    button:disabled {
      color: var(--tw-hairline);
      cursor: default;
    }
    :focus-visible {
      position: relative;
      outline: 3px solid var(--tw-carbon);
    }
  `,
})
export class CountStepper implements ControlValueAccessor {
  readonly label = input.required<string>();
  readonly min = input(0);
  readonly max = input(999);
  readonly step = input(1);

  protected readonly id = `tw-count-${steppers++}`;
  protected readonly value = signal(0);
  protected readonly disabled = signal(false);
  protected touched: () => void = () => undefined;
  #changed: (value: number) => void = () => undefined;

  protected set(value: number): void {
    this.value.set(Math.max(this.min(), Math.min(this.max(), value)));
    this.#changed(this.value());
  }

  protected typed(event: Event): void {
    const field = event.target as HTMLInputElement;
    const text = field.value.trim();
    if (/^\d{1,6}$/.test(text)) this.set(Number(text));
    // The field must not go on showing what was not taken.
    field.value = String(this.value());
  }

  writeValue(value: number | null): void {
    this.value.set(value ?? this.min());
  }

  registerOnChange(changed: (value: number) => void): void {
    this.#changed = changed;
  }

  registerOnTouched(touched: () => void): void {
    this.touched = touched;
  }

  setDisabledState(disabled: boolean): void {
    this.disabled.set(disabled);
  }
}

import {
  booleanAttribute,
  ChangeDetectionStrategy,
  Component,
  forwardRef,
  input,
  signal,
} from '@angular/core';
import { type ControlValueAccessor, NG_VALUE_ACCESSOR } from '@angular/forms';

export interface Choice<T extends string = string> {
  readonly value: T;
  readonly label: string;
}

let groups = 0;

/**
 * One of few, or several of few with `many`, each a target of its own for a thumb. Chosen things
 * are outlined, not coloured in. Native radio buttons and checkboxes underneath, so keys work as
 * they do everywhere.
 */
@Component({
  selector: 'tw-choices',
  changeDetection: ChangeDetectionStrategy.OnPush,
  providers: [
    { provide: NG_VALUE_ACCESSOR, useExisting: forwardRef(() => ChoiceChips), multi: true },
  ],
  template: `
    <fieldset [disabled]="disabled()" [attr.aria-describedby]="describedBy() ?? null">
      <legend [class.tw-unseen]="legendUnseen()">{{ legend() }}</legend>
      <div class="chips">
        @for (choice of choices(); track choice.value) {
          <label [class.chosen]="isChosen(choice.value)">
            <input
              class="tw-unseen"
              [type]="many() ? 'checkbox' : 'radio'"
              [name]="name"
              [value]="choice.value"
              [checked]="isChosen(choice.value)"
              (change)="choose(choice.value)"
              (blur)="touched()"
            />
            {{ choice.label }}
          </label>
        }
      </div>
    </fieldset>
  `,
  styleUrl: './choice-chips.scss',
})
export class ChoiceChips implements ControlValueAccessor {
  readonly legend = input.required<string>();
  readonly legendUnseen = input(false, { transform: booleanAttribute });
  readonly choices = input.required<readonly Choice[]>();
  readonly many = input(false, { transform: booleanAttribute });
  readonly describedBy = input<string>();

  protected readonly name = `tw-choices-${groups++}`;
  protected readonly chosen = signal<readonly string[]>([]);
  protected readonly disabled = signal(false);
  protected touched: () => void = () => undefined;
  #changed: (value: string | readonly string[] | null) => void = () => undefined;

  protected isChosen(value: string): boolean {
    return this.chosen().includes(value);
  }

  protected choose(value: string): void {
    const rest = this.chosen().filter((chosen) => chosen !== value);
    if (!this.many()) this.chosen.set([value]);
    else this.chosen.set(this.isChosen(value) ? rest : [...rest, value]);
    this.#changed(this.many() ? this.chosen() : value);
  }

  writeValue(value: string | readonly string[] | null): void {
    if (Array.isArray(value)) this.chosen.set(value as readonly string[]);
    else this.chosen.set(value ? [value as string] : []);
  }

  registerOnChange(changed: (value: string | readonly string[] | null) => void): void {
    this.#changed = changed;
  }

  registerOnTouched(touched: () => void): void {
    this.touched = touched;
  }

  setDisabledState(disabled: boolean): void {
    this.disabled.set(disabled);
  }
}

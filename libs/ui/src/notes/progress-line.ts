import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** How far long work is, as a bar and in words: "5 of 8 mailed, 1 uncertain". */
@Component({
  selector: 'tw-progress-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div
      class="track"
      role="progressbar"
      aria-valuemin="0"
      [attr.aria-label]="label()"
      [attr.aria-valuemax]="of()"
      [attr.aria-valuenow]="done()"
      [attr.aria-valuetext]="text()"
    >
      <div class="done" [style.inline-size.%]="percent()"></div>
    </div>
    <p class="tw-figures">
      <span>{{ text() }}</span>
      @if (rest(); as words) {
        <span>{{ words }}</span>
      }
    </p>
  `,
  styles: `
    :host {
      display: block;
    }
    .track {
      block-size: 0.5rem;
      border: 1px solid var(--tw-carbon);
      border-radius: 0.25rem;
      overflow: hidden;
    }
    .done {
      block-size: 100%;
      background: var(--tw-carbon);
    }
    p {
      display: flex;
      justify-content: space-between;
      gap: 1rem;
      margin: 0.375rem 0 0;
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
  `,
})
export class ProgressLine {
  readonly label = input.required<string>();
  readonly done = input.required<number>();
  readonly of = input.required<number>();
  /** What is being done to the things counted: "mailed", "read". */
  readonly word = input('done');
  /** Said after the count: "1 uncertain". */
  readonly aside = input<string>();
  /** Said at the end of the line: "about 20 s". */
  readonly rest = input<string>();

  protected readonly percent = computed(() =>
    this.of() > 0 ? Math.min(100, (this.done() / this.of()) * 100) : 0,
  );
  protected readonly text = computed(() => {
    const counted = `${this.done()} of ${this.of()} ${this.word()}`;
    return this.aside() ? `${counted}, ${this.aside()}` : counted;
  });
}

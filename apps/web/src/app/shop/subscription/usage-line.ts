import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Usage } from './subscription-api';

/** How much of a limit is used: a bar, and in words what that means. */
@Component({
  selector: 'tw-usage-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <div class="track" aria-hidden="true">
      <div class="used" [style.inline-size.%]="percent()"></div>
    </div>
    <p>{{ usage().words }}</p>
  `,
  host: { '[attr.data-level]': 'usage().level' },
  styles: `
    :host {
      display: block;
      --level: var(--tw-carbon);
    }
    :host(:not([data-level='within'])) {
      --level: var(--tw-ochre);
    }
    .track {
      block-size: 0.5rem;
      border: 1px solid var(--level);
      border-radius: 0.25rem;
      overflow: hidden;
    }
    .used {
      block-size: 100%;
      background: var(--level);
    }
    p {
      margin: 0.25rem 0 0;
    }
  `,
})
export class UsageLine {
  readonly usage = input.required<Usage>();

  protected readonly percent = computed(() => {
    const { used, limit } = this.usage();
    return limit > 0 ? Math.min(100, (used / limit) * 100) : 100;
  });
}

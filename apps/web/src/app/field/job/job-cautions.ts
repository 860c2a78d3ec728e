import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { cautionsFor, localCodeNotice } from '@lib/domain/cautions/cautions';
import { ClockPipe } from '@lib/ui';
import { type SheetJob } from '../kept/kept';

/** The cautions for the machine's kind and energy, ticked one by one before covers come off. */
@Component({
  selector: 'tw-job-cautions',
  imports: [ClockPipe],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (job().shop?.cautionsAt; as at) {
      <details>
        <summary>
          <span>Before covers come off: all {{ cautions().length }} ticked</span>
          <span class="at tw-figures">{{ at | twClock }}</span>
        </summary>
        <ul>
          @for (caution of cautions(); track caution.code) {
            <li>{{ caution.words }}</li>
          }
        </ul>
        <p class="notice">{{ notice }}</p>
      </details>
    } @else {
      <fieldset [disabled]="closed()">
        <legend>Before covers come off</legend>
        <p class="tw-soft">{{ left() }} of {{ cautions().length }} left to tick.</p>
        @for (caution of cautions(); track caution.code) {
          <label>
            <input
              type="checkbox"
              [checked]="ticked(caution.code)"
              [disabled]="ticked(caution.code)"
              (change)="tick.emit(caution.code)"
            />
            <span>{{ caution.words }}</span>
          </label>
        }
        <p class="notice">{{ notice }}</p>
      </fieldset>
    }
  `,
  styleUrl: './job-cautions.scss',
})
export class JobCautions {
  readonly job = input.required<SheetJob>();
  readonly closed = input(false);
  readonly tick = output<string>();

  protected readonly notice = localCodeNotice;
  protected readonly cautions = computed(() => {
    const { kind, energy } = this.job().machine;
    return cautionsFor(kind, energy);
  });
  protected readonly left = computed(
    () => this.cautions().filter(({ code }) => !this.ticked(code)).length,
  );

  protected ticked(code: string): boolean {
    return this.job().shop?.cautions.includes(code) ?? false;
  }
}

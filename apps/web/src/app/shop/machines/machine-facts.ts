import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { dayIn, DayPipe, MoneyText, Reading, SectionHead } from '@lib/ui';
import { type Machine } from './machines-api';

/** What is known of a machine. */
@Component({
  selector: 'tw-machine-facts',
  imports: [DayPipe, MoneyText, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @let shown = machine();
    <div>
      <tw-section-head heading="Data" />
      <dl class="tw-facts">
        <dt>Supply</dt>
        <dd>{{ supply() }}</dd>
        <dt>Price of a cycle</dt>
        <dd>
          @if (shown.vendPrice) {
            <tw-money [amount]="shown.vendPrice" />
          } @else {
            not noted
          }
        </dd>
        <dt>Cycles a day</dt>
        <dd>{{ shown.cyclesADay || 'not noted' }}</dd>
        @if (shown.vendPrice && shown.cyclesADay) {
          <dt>A day down misses</dt>
          <dd>about <tw-money [amount]="missed()" /></dd>
        }
        <dt>Built</dt>
        <dd>{{ (shown.builtOn | twDay) || 'not noted' }}</dd>
        <dt>Installed</dt>
        <dd>{{ (shown.installedOn | twDay) || 'not noted' }}</dd>
        <dt>Supplier warranty</dt>
        <dd>{{ warranty() }} {{ shown.supplierWarrantyUntil | twDay }}</dd>
        <dt>Sticker</dt>
        <dd class="tw-figures">{{ shown.stickerCode }}</dd>
        @if (shown.note) {
          <dt>Note</dt>
          <dd class="note">{{ shown.note }}</dd>
        }
      </dl>
    </div>
  `,
  styles: `
    .note {
      white-space: pre-line;
    }
  `,
})
export class MachineFacts {
  readonly #reading = inject(Reading);
  readonly machine = input.required<Machine>();

  protected readonly supply = computed(() => {
    const { volts, amps, energy } = this.machine();
    const electric = [volts ? `${volts} V` : '', amps ? `${amps} A` : ''].filter(Boolean);
    return [energy, ...electric].join(', ');
  });
  protected readonly missed = computed(() =>
    Math.round(this.machine().vendPrice * this.machine().cyclesADay),
  );
  protected readonly warranty = computed(() => {
    const until = this.machine().supplierWarrantyUntil;
    if (!until) return 'not noted';
    return until < dayIn(this.#reading.zone(), new Date()) ? 'ended on' : 'until';
  });
}

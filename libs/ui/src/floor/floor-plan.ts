import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  model,
  output,
  signal,
} from '@angular/core';
import { labelFor, wordFor } from '../words/words';
import { MachineGlyph } from '../machine-glyph/machine-glyph';
import { type FloorBank, type FloorBay, type FloorChoice } from './floor-bay';

interface Place {
  readonly row: number;
  readonly column: number;
}

/**
 * A store's floor: banks as rows of machines in their bays. One ARIA grid with one tab stop; the
 * arrow keys walk the bays, Enter or Space chooses. What is known of a bay is shown when it has the
 * focus or the pointer, and read out as the cell's name.
 */
@Component({
  selector: 'tw-floor',
  imports: [MachineGlyph],
  templateUrl: './floor-plan.html',
  styleUrl: './floor-plan.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FloorPlan {
  readonly #host = inject<ElementRef<HTMLElement>>(ElementRef);

  readonly banks = input.required<readonly FloorBank[]>();
  readonly label = input('Floor');
  readonly choice = input<FloorChoice>('none');
  /** Ids of the chosen bays. */
  readonly chosen = model<readonly string[]>([]);
  /** A bay was clicked or entered; for floors that open a machine rather than choose it. */
  readonly opened = output<FloorBay>();

  protected readonly place = signal<Place>({ row: 0, column: 0 });
  /** The bay under the pointer or the focus, for the line below the floor. */
  protected readonly looked = signal<FloorBay | undefined>(undefined);
  protected readonly chosenSet = computed(() => new Set(this.chosen()));
  protected readonly selectable = computed(() => this.choice() !== 'none');

  /** Banks without bays have no row: a row of a grid needs a cell. */
  protected readonly rows = computed(() => this.banks().filter((bank) => bank.bays.length > 0));

  /** The place that takes the tab stop, moved inside when machines left the floor. */
  protected readonly tabPlace = computed<Place>(() => {
    const { row, column } = this.place();
    const lastRow = Math.max(0, Math.min(row, this.rows().length - 1));
    const bays = this.rows()[lastRow]?.bays.length ?? 0;
    return { row: lastRow, column: Math.max(0, Math.min(column, bays - 1)) };
  });

  protected textOf(bay: FloorBay): string {
    const known = `${bay.label}, ${wordFor(bay.kind)}, ${wordFor(bay.state)}`;
    return bay.note ? `${known}: ${bay.note}` : known;
  }

  protected captionOf(bay: FloorBay): string {
    const known = `${bay.label} · ${labelFor(bay.kind)}, ${wordFor(bay.state)}`;
    return bay.note ? `${known} · ${bay.note}` : known;
  }

  protected choose(bay: FloorBay, place: Place): void {
    this.place.set(place);
    const chosen = this.chosenSet();
    if (this.choice() === 'one') this.chosen.set([bay.id]);
    if (this.choice() === 'many') {
      const left = this.chosen().filter((id) => id !== bay.id);
      this.chosen.set(chosen.has(bay.id) ? left : [...left, bay.id]);
    }
    this.opened.emit(bay);
  }

  protected walk(event: KeyboardEvent, bay: FloorBay): void {
    const at = this.tabPlace();
    if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      this.choose(bay, at);
      return;
    }
    const next = this.#step(event, at);
    if (!next) return;
    event.preventDefault();
    this.place.set(next);
    const { row, column } = this.tabPlace();
    this.#host.nativeElement.querySelector<HTMLElement>(`[data-place="${row}-${column}"]`)?.focus();
  }

  #step(event: KeyboardEvent, at: Place): Place | undefined {
    const last = (row: number) => (this.rows()[row]?.bays.length ?? 1) - 1;
    const lastRow = this.rows().length - 1;
    switch (event.key) {
      case 'ArrowRight':
        return { row: at.row, column: Math.min(at.column + 1, last(at.row)) };
      case 'ArrowLeft':
        return { row: at.row, column: Math.max(at.column - 1, 0) };
      case 'ArrowDown':
        return { row: Math.min(at.row + 1, lastRow), column: at.column };
      case 'ArrowUp':
        return { row: Math.max(at.row - 1, 0), column: at.column };
      case 'Home':
        return { row: event.ctrlKey ? 0 : at.row, column: 0 };
      case 'End': {
        const row = event.ctrlKey ? lastRow : at.row;
        return { row, column: last(row) };
      }
      default:
        return undefined;
    }
  }
}

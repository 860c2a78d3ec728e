import { Directive } from '@angular/core';
import { MeasureInput, measureProviders } from './measure-input';
import { basisPointsFrom, percentText } from './measures';

/** A rate as people write it, "8.25", in basis points in the form. */
@Directive({
  selector: 'input[twPercent]',
  providers: measureProviders(() => PercentInput),
})
export class PercentInput extends MeasureInput {
  protected override valueOf(text: string): number | undefined {
    return basisPointsFrom(text);
  }

  protected override textOf(value: number): string {
    return percentText(value);
  }

  protected override expected(): string {
    return 'Write a rate like 8.25.';
  }
}

/** The price book says nothing about a visit's trip or a part; somebody must complete it. */
export class PriceBookGap extends Error {
  constructor(
    readonly gap: 'no_trip_rule' | 'no_markup_band',
    message: string,
  ) {
    super(message);
    this.name = 'PriceBookGap';
  }
}

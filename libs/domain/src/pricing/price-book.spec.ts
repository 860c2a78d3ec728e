import { type TripRule } from './edition';
import { partUnitPrice } from './part-price';
import { PriceBookGap } from './price-book-gap';
import { sampleEdition, samplePart } from './sample-visit';
import { tripRuleFor } from './trip';

describe('tripRuleFor', () => {
  const rules: TripRule[] = [
    { label: 'far', amount: 140_00 },
    { label: 'to 40 km', amount: 85_00, upToMetres: 40_000 },
    { label: 'to 20 km', amount: 75_00, upToMetres: 20_000 },
    { label: 'north', amount: 60_00, zone: 'north' },
    { label: 'north, near', amount: 55_00, zone: 'north', upToMetres: 10_000 },
    { label: 'Alder', amount: 50_00, place: 'Alder' },
  ];

  it.each([
    [{}, 'far'],
    [{ metres: 40_001 }, 'far'],
    [{ metres: 40_000 }, 'to 40 km'],
    [{ metres: 1_000 }, 'to 20 km'],
    [{ zone: 'north', metres: 90_000 }, 'north'],
    [{ zone: 'north', metres: 9_000 }, 'north, near'],
    [{ zone: 'north', place: 'Alder', metres: 9_000 }, 'Alder'],
    [{ place: 'Birch', metres: 30_000 }, 'to 40 km'],
  ])('for %j is %s', (store, label) => {
    expect(tripRuleFor(rules, store).label).toBe(label);
    expect(tripRuleFor([...rules].reverse(), store).label).toBe(label);
  });

  it('does not send anybody for nothing when no rule holds', () => {
    expect(() => tripRuleFor(rules.slice(1), { metres: 50_000 })).toThrow(PriceBookGap);
  });
});

describe('partUnitPrice', () => {
  it.each([
    ['by the lowest band', { unitCost: 19_99 }, 40_00],
    ['by the band from its start on', { unitCost: 20_00 }, 30_00],
    ['by the highest band', { unitCost: 101_00 }, 126_25],
    ['as the book fixes it', { unitCost: 20_00, partId: 'door-lock' }, 64_00],
    ['as agreed, before the book', { partId: 'door-lock', fixedPrice: 50_00 }, 50_00],
    ['as agreed, also for nothing', { fixedPrice: 0 }, 0],
  ])('%s', (_, part, unitPrice) => {
    expect(partUnitPrice(samplePart(part), sampleEdition, {}).unitPrice).toBe(unitPrice);
  });

  it('steps upwards where the shop says so, from the exact fraction', () => {
    const edition = {
      ...sampleEdition,
      markup: { ...sampleEdition.markup, step: 100, rounding: 'up' as const },
    };
    expect(partUnitPrice(samplePart({ unitCost: 20_00 }), edition, {}).unitPrice).toBe(30_00);
    expect(partUnitPrice(samplePart({ unitCost: 20_01 }), edition, {}).unitPrice).toBe(31_00);
  });

  it('refuses a cost that no band holds', () => {
    const edition = { ...sampleEdition, markup: { ...sampleEdition.markup, bands: [] } };
    expect(() => partUnitPrice(samplePart(), edition, {})).toThrow(PriceBookGap);
  });
});

import { type Energy, type MachineKind } from '../words/trade';
import { cautionsFor, localCodeNotice } from './cautions';

const kinds: MachineKind[] = [
  'top_loader',
  'front_loader',
  'dryer',
  'stacked_pair',
  'extractor',
  'changer',
  'heater',
];
const energies: Energy[] = ['electric', 'gas', 'steam'];
const all = kinds.flatMap((kind) => energies.map((energy) => [kind, energy] as const));

function codes(kind: MachineKind, energy: Energy): string[] {
  return cautionsFor(kind, energy).map((caution) => caution.code);
}

describe('cautionsFor', () => {
  it.each(all)('%s, %s: isolate, lock, relieve, prove, in that order', (kind, energy) => {
    const order = ['isolate', 'lock_and_tag', 'discharge_capacitors', 'prove_dead'];
    const seen = codes(kind, energy);
    expect(seen.filter((code) => order.includes(code))).toEqual(
      order.filter((code) => code !== 'discharge_capacitors' || kind !== 'heater'),
    );
    expect(seen.slice(0, 2)).toEqual(['isolate', 'lock_and_tag']);
  });

  it('knows a gas dryer', () => {
    expect(codes('dryer', 'gas')).toEqual([
      'isolate',
      'lock_and_tag',
      'close_gas_cock',
      'discharge_capacitors',
      'prove_dead',
      'let_cool',
      'block_drum',
      'stand_safely',
    ]);
  });

  it('knows an electric front loader', () => {
    expect(codes('front_loader', 'electric')).toEqual([
      'isolate',
      'lock_and_tag',
      'close_water',
      'discharge_capacitors',
      'prove_dead',
      'block_drum',
      'stand_safely',
      'standing_water',
    ]);
  });

  it('relieves and proves before anybody reaches in', () => {
    for (const [kind, energy] of all) {
      const seen = codes(kind, energy);
      const proved = seen.indexOf('prove_dead');
      for (const supply of ['close_gas_cock', 'close_steam_valve', 'close_water']) {
        expect(seen.indexOf(supply)).toBeLessThan(proved);
      }
      const drum = seen.indexOf('block_drum');
      if (drum >= 0) expect(drum).toBeGreaterThan(proved);
    }
  });

  it('shuts gas only where there is gas, steam only where there is steam', () => {
    for (const [kind, energy] of all) {
      expect(codes(kind, energy).includes('close_gas_cock')).toBe(energy === 'gas');
      expect(codes(kind, energy).includes('close_steam_valve')).toBe(energy === 'steam');
    }
  });

  it('never reads as a permission', () => {
    const words = all.flatMap(([kind, energy]) => cautionsFor(kind, energy)).map((c) => c.words);
    for (const each of words) {
      expect(each).not.toMatch(/\b(you may|you can|allowed|permitted|is safe|safe to)\b/i);
    }
    expect(localCodeNotice).toMatch(/local code/);
    expect(localCodeNotice).toMatch(/licensed/);
  });
});

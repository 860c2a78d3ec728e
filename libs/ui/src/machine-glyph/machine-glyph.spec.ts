import { TestBed } from '@angular/core/testing';
import { type MachineKind, type MachineState } from '@lib/contracts/web';
import { MachineGlyph } from './machine-glyph';

async function drawn(kind: MachineKind, state: MachineState, decorative = false) {
  const fixture = TestBed.createComponent(MachineGlyph);
  fixture.componentRef.setInput('kind', kind);
  fixture.componentRef.setInput('state', state);
  fixture.componentRef.setInput('decorative', decorative);
  await fixture.whenStable();
  const host = fixture.nativeElement as HTMLElement;
  return host.querySelector('svg') as SVGElement;
}

const kinds: MachineKind[] = [
  'top_loader',
  'front_loader',
  'dryer',
  'stacked_pair',
  'extractor',
  'changer',
  'heater',
];

describe('MachineGlyph', () => {
  it('draws every kind differently', async () => {
    const drawings = new Set<string>();
    for (const kind of kinds) drawings.add((await drawn(kind, 'retired')).innerHTML);
    expect(drawings.size).toBe(kinds.length);
  });

  it('tells every state but retired by shape alone', async () => {
    const shapes = new Set<string>();
    for (const state of ['up', 'degraded', 'down', 'locked_out'] as const) {
      shapes.add((await drawn('front_loader', state)).innerHTML);
    }
    expect(shapes.size).toBe(4);
  });

  it('names kind and state, unless words beside it do', async () => {
    expect((await drawn('dryer', 'locked_out')).getAttribute('aria-label')).toBe(
      'Dryer, locked out',
    );
    const silent = await drawn('dryer', 'up', true);
    expect(silent.getAttribute('aria-hidden')).toBe('true');
    expect(silent.hasAttribute('aria-label')).toBe(false);
  });
});

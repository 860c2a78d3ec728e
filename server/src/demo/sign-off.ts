import { ask } from './ask';
import { type Random } from './random';
import { type DemoShop } from './set-up';

const outOfGoodwill = [
  'Third visit this month: we would rather keep the laundry',
  'They waited two weeks for the part',
];

/** The owner decides what waits for a decision, and the office signs the ticket off. */
export async function signOff(
  shop: DemoShop,
  visitId: string,
  now: Date,
  random: Random,
): Promise<void> {
  await decideRulings(shop, visitId, now, random);
  await ask(shop.office.at(now), 'tickets.signOff', { params: { visitId }, body: {} });
}

async function decideRulings(
  shop: DemoShop,
  visitId: string,
  now: Date,
  random: Random,
): Promise<void> {
  const owner = shop.owner.at(now);
  const rulings = await ask(owner, 'rulings.show', { params: { visitId } });
  const lines = rulings.jobs.flatMap((job) => job.lines);
  const said = ({ lineKey, basis }: { lineKey: string; basis: string }) => ({ lineKey, basis });
  const kind = random.chance(0.05)
    ? lines.find((l) => l.kind === 'labour' && l.bearer === 'store' && !l.waiting)
    : undefined;
  if (kind) {
    await ask(owner, 'rulings.overrule', {
      params: { visitId },
      body: { lines: [said(kind)], bearer: 'goodwill', why: random.pick(outOfGoodwill) },
    });
  }
  const waiting = lines.filter((line) => line.waiting && line !== kind);
  if (waiting.length) {
    await ask(owner, 'rulings.confirm', {
      params: { visitId },
      body: { lines: waiting.map(said) },
    });
  }
}

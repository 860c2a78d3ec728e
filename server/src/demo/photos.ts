import sharp from 'sharp';
import { ask } from './ask';
import { type PastJob } from './day-story';
import { type Person } from './people';
import { type Random } from './random';

const oneDay = 86_400_000;
/** Older proof nobody looks at in a demo. */
const photosForDays = 60;

/** A drawing in place of a photograph: the open machine, the part, and a mark where it was. */
function drawing(words: string, hue: number): Buffer {
  return Buffer.from(`<svg xmlns="http://www.w3.org/2000/svg" width="960" height="720">
    <rect width="960" height="720" fill="hsl(${hue} 14% 82%)"/>
    <rect x="250" y="90" width="460" height="560" rx="18" fill="hsl(${hue} 8% 94%)" stroke="#1d2436" stroke-width="8"/>
    <circle cx="480" cy="400" r="160" fill="none" stroke="#1d2436" stroke-width="10"/>
    <circle cx="480" cy="400" r="112" fill="hsl(${hue} 20% 70%)" stroke="#1d2436" stroke-width="6"/>
    <path d="M700 150 L600 300" stroke="#3a3f9c" stroke-width="12"/>
    <circle cx="590" cy="316" r="34" fill="none" stroke="#3a3f9c" stroke-width="12"/>
    <text x="480" y="700" font-family="sans-serif" font-size="30" text-anchor="middle" fill="#1d2436">${words}</text>
  </svg>`);
}

/** The tech takes a picture of most of what was put right. */
export async function addPhotos(
  tech: Person,
  done: readonly PastJob[],
  arrival: Date,
  random: Random,
): Promise<void> {
  if (Date.now() - arrival.getTime() > photosForDays * oneDay) return;
  for (const job of done) {
    if (!random.chance(0.6)) continue;
    const content = await sharp(drawing(job.fault.found, random.below(360)))
      .jpeg()
      .toBuffer();
    await ask(tech.at(arrival), 'files.add', {
      body: { ownerKind: 'job', ownerId: job.jobId },
      file: { name: `${job.fault.category}.jpg`, content },
    });
  }
}

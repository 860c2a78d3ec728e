import path from 'node:path';
import sharp from 'sharp';

const paper = '#ece9e0';
const hairline = '#d9d6cb';
const margin = 24;
const left = 960;
const height = 820;

interface Cutting {
  from: string;
  /** Of the picture, in its pixels. */
  area: { left: number; top: number; width: number; height: number };
  /** On the sheet; its height follows. */
  width: number;
}

const floor: Cutting = {
  from: 'shop-store',
  area: { left: 0, top: 0, width: 1280, height: 536 },
  width: left,
};
const ticket: Cutting = {
  from: 'shop-ticket',
  area: { left: 230, top: 80, width: 1050, height: 384 },
  width: left,
};
const day: Cutting = {
  from: 'field-day',
  area: { left: 0, top: 0, width: 390, height: 844 },
  width: 357,
};

/** The first picture of the README: a store's floor, a ticket, and the tech's day, on one sheet. */
export async function layOutOverview(folder: string): Promise<void> {
  const [top, below, beside] = await Promise.all(
    [floor, ticket, day].map((cutting) => cut(folder, cutting)),
  );
  if (!top || !below || !beside) return;
  await sharp({
    create: {
      width: 3 * margin + left + beside.width,
      height,
      channels: 3,
      background: paper,
    },
  })
    .composite([
      { input: top.data, left: margin, top: margin },
      { input: below.data, left: margin, top: height - margin - below.height },
      { input: beside.data, left: 2 * margin + left, top: margin },
    ])
    .png({ palette: true, colours: 128, effort: 10 })
    .toFile(path.join(folder, 'overview.png'));
}

async function cut(folder: string, { from, area, width }: Cutting) {
  const cutOut = await sharp(path.join(folder, `${from}.png`))
    .extract(area)
    .toBuffer();
  const { data, info } = await sharp(cutOut)
    .resize({ width: width - 2 })
    .extend({ top: 1, bottom: 1, left: 1, right: 1, background: hairline })
    .png()
    .toBuffer({ resolveWithObject: true });
  return { data, width: info.width, height: info.height };
}

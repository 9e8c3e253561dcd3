import sharp from 'sharp';

/** What a drawn picture shows: bars, a chair, a tape with the cover read, and a card with the place. */
export interface Picture {
  card: string;
  tapeMm: number;
  seed: number;
}

/** A small generator with a seed: the demo is the same on every machine. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

function bars(random: () => number): string {
  const along = Array.from({ length: 7 }, (_, index) => {
    const y = 90 + index * 120 + (random() - 0.5) * 14;
    return `<rect x="-20" y="${y}" width="1240" height="26" rx="12" fill="#6b5a4a"/><path d="M0 ${y + 7}H1200" stroke="#8d7a66" stroke-width="5" stroke-dasharray="9 13"/>`;
  });
  const across = Array.from({ length: 9 }, (_, index) => {
    const x = 60 + index * 138 + (random() - 0.5) * 18;
    return `<rect x="${x}" y="-20" width="30" height="940" rx="14" fill="#5d4e41"/><path d="M${x + 9} 0V900" stroke="#84725f" stroke-width="5" stroke-dasharray="10 14"/>`;
  });
  return along.join('') + across.join('');
}

function tape(millimetres: number): string {
  const marks = Array.from({ length: 81 }, (_, mm) => {
    const y = 780 - mm * 7;
    const long = mm % 10 === 0;
    return `<path d="M880 ${y}h${long ? 46 : 24}" stroke="#222" stroke-width="${long ? 3 : 1.5}"/>${long ? `<text x="934" y="${y + 9}" font-size="26" font-family="sans-serif">${mm}</text>` : ''}`;
  });
  const read = 780 - millimetres * 7;
  return `<rect x="876" y="200" width="110" height="600" fill="#f2d04b"/>${marks.join('')}<path d="M830 ${read}h180" stroke="#b3261e" stroke-width="5"/>`;
}

/** Draws a picture of a cage as a JPEG of about 1200 x 900, with the grain of a phone's camera. */
export async function drawPicture(picture: Picture): Promise<Buffer> {
  const random = seeded(picture.seed);
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="1200" height="900">
    <rect width="1200" height="900" fill="#b9a78a"/>${Array.from({ length: 9 }, (_, index) => `<path d="M0 ${index * 104}H1200" stroke="#a08e72" stroke-width="3"/>`).join('')}
    <g opacity="0.35" transform="translate(10 14)">${bars(seeded(picture.seed))}</g>${bars(random)}
    <path d="M210 760l40-130h60l40 130" fill="none" stroke="#3c4a4a" stroke-width="12"/>
    ${tape(picture.tapeMm)}
    <rect x="330" y="640" width="430" height="150" fill="#fbf9f3" stroke="#222" stroke-width="3"/>
    <text x="352" y="735" font-size="64" font-family="sans-serif" fill="#16201f">${picture.card.replace(/[<&>]/g, '')}</text>
  </svg>`;
  const grain = Buffer.alloc(300 * 225 * 3);
  for (let index = 0; index < grain.length; index += 1) grain[index] = 112 + Math.floor(random() * 34);
  const noise = await sharp(grain, { raw: { width: 300, height: 225, channels: 3 } })
    .resize(1200, 900)
    .png()
    .toBuffer();
  return sharp(Buffer.from(svg))
    .composite([{ input: noise, blend: 'soft-light' }])
    .jpeg({ quality: 78 })
    .toBuffer();
}

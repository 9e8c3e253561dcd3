// Draws the application's icons: a bar cage in section inside a ruled frame. Writes public/icons; run after a change here.
import { mkdir, writeFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import sharp from 'sharp';

const colours = { sheet: '#fcfbf6', ink: '#141d1e', band: '#f0c9b8', steel: '#8d8478', rule: '#c6c2b2' };

/** The cage: the concrete's outline, the band of cover inside it, a tie with hooked ends, and the main bars. */
function cage() {
  const bars = [
    [172, 172],
    [256, 172],
    [340, 172],
    [172, 340],
    [256, 340],
    [340, 340],
    [172, 256],
    [340, 256],
  ];
  return `
  <rect x="92" y="92" width="328" height="328" fill="${colours.band}"/>
  <rect x="138" y="138" width="236" height="236" rx="34" fill="${colours.sheet}"/>
  <rect x="92" y="92" width="328" height="328" fill="none" stroke="${colours.ink}" stroke-width="16"/>
  <rect x="144" y="144" width="224" height="224" rx="30" fill="none" stroke="${colours.ink}" stroke-width="13"/>
  <path d="M148 176l56 56M176 148l56 56" stroke="${colours.ink}" stroke-width="13" stroke-linecap="round"/>
  ${bars.map(([x, y]) => `<circle cx="${x}" cy="${y}" r="21" fill="${colours.steel}" stroke="${colours.ink}" stroke-width="9"/>`).join('\n  ')}`;
}

/** On a sheet with its frame: the heavy line, the trim line outside it, centring marks between them. */
function framed() {
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 512 512">
  <rect width="512" height="512" fill="${colours.sheet}"/>
  <rect x="14" y="14" width="484" height="484" fill="none" stroke="${colours.rule}" stroke-width="5"/>
  <rect x="40" y="40" width="432" height="432" fill="none" stroke="${colours.ink}" stroke-width="9"/>
  <path d="M256 14v26M256 472v26M14 256h26M472 256h26" stroke="${colours.ink}" stroke-width="6"/>
  ${cage()}
</svg>
`;
}

/** For masks of any shape: the cage alone, inside the middle four fifths. */
function maskable() {
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 512 512">
  <rect width="512" height="512" fill="${colours.sheet}"/>
  <g transform="translate(256 256) scale(0.78) translate(-256 -256)">${cage()}
  </g>
</svg>
`;
}

const folder = fileURLToPath(new URL('../public/icons/', import.meta.url));
await mkdir(folder, { recursive: true });
const png = (svg, size, name) =>
  sharp(Buffer.from(svg), { density: 144 }).resize(size, size).png().toFile(`${folder}${name}`);
await writeFile(`${folder}cage.svg`, framed());
await writeFile(`${folder}cage-maskable.svg`, maskable());
await png(framed(), 192, 'cage-192.png');
await png(framed(), 512, 'cage-512.png');
await png(framed(), 180, 'cage-apple-180.png');
await png(maskable(), 192, 'cage-maskable-192.png');
await png(maskable(), 512, 'cage-maskable-512.png');

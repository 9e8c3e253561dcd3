import { inflateSync } from 'node:zlib';

const compact = (text: string) => text.replace(/\s+/g, ' ').trim();

/** The objects of a PDF by number, as Latin-1 text; enough for files that pdfkit writes. */
function objectsOf(pdf: Buffer): Map<string, string> {
  const found = pdf.toString('latin1').matchAll(/(?:^|\n)(\d+) 0 obj\n([\s\S]*?)\nendobj/g);
  return new Map([...found].map(([, number = '', body = '']) => [number, body]));
}

function streamOf(object: string | undefined): string {
  const found = /stream\n([\s\S]*)\nendstream/.exec(object ?? '');
  if (!found) return '';
  const bytes = Buffer.from(found[1] ?? '', 'latin1');
  return (object ?? '').includes('/FlateDecode')
    ? inflateSync(bytes).toString('latin1')
    : bytes.toString('latin1');
}

/** Which text each glyph of an embedded font stands for. */
function glyphsOf(toUnicode: string): Map<number, string> {
  const glyphs = new Map<number, string>();
  const textOf = (hex: string) => Buffer.from(hex.replace(/\s/g, ''), 'hex').swap16().toString('utf16le');
  for (const [, from = '0', list = ''] of toUnicode.matchAll(/<([0-9a-f]+)> <[0-9a-f]+> \[([^\]]*)\]/gi)) {
    const texts = [...list.matchAll(/<([0-9a-f ]+)>/gi)].map(([, hex = '']) => textOf(hex));
    texts.forEach((text, index) => glyphs.set(parseInt(from, 16) + index, text));
  }
  return glyphs;
}

/** The text of a PDF whose fonts are embedded, page after page, with runs of white space as one blank. */
export function pdfText(pdf: Buffer): string {
  const objects = objectsOf(pdf);
  const fonts = new Map<string, Map<number, string>>();
  for (const object of objects.values())
    for (const [, name = '', number = ''] of object.matchAll(/\/(F\d+) (\d+) 0 R/g)) {
      const toUnicode = /\/ToUnicode (\d+) 0 R/.exec(objects.get(number) ?? '')?.[1];
      fonts.set(name, glyphsOf(streamOf(objects.get(toUnicode ?? ''))));
    }
  const pages = [...objects.values()].flatMap((object) => /\/Contents (\d+) 0 R/.exec(object)?.[1] ?? []);
  return compact(
    pages
      .flatMap((number) => [...streamOf(objects.get(number)).matchAll(/BT\n([\s\S]*?)ET\n/g)])
      .map(([, block = '']) => {
        const glyphs = fonts.get(/\/(F\d+) /.exec(block)?.[1] ?? '');
        const hex = [...block.matchAll(/<([0-9a-f]+)>/gi)].map(([, one = '']) => one).join('');
        return (hex.match(/.{4}/g) ?? []).map((glyph) => glyphs?.get(parseInt(glyph, 16)) ?? '?').join('');
      })
      .join(' '),
  );
}

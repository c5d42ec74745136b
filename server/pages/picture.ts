import { join } from 'node:path';

import sharp from 'sharp';

import type { CellList, CellPage, CurvePoint } from '@/lib/contract/cells';
import { lifeInShort } from '@/lib/contract/lifeWords';
import { formatCount, formatPercent, formatYears } from '@/lib/units';

import { escapeHtml } from './html';

const size = { width: 1200, height: 630 };
const plot = { left: 90, right: 1130, top: 300, bottom: 560 };
// As in components/theme.css, light: a picture has no theme.
const colour = { paper: '#f6f3ec', ink: '#17252b', quiet: '#51626a', line: '#d9d3c5', tide: '#0b5c63' };
const mark = 'M0 4H8.4V13H17.4V20.5H26L27.7 23.6L29.4 20.5H32V26.5H15.8V19H6.8V10H0Z';

/** PNG for previews of links to a cell type: its name, its life, its curve. */
export const cellPicture = ({ cellType: { name }, view, pool }: CellPage): Promise<Buffer> =>
  draw({
    title: name,
    lines: [
      view.life ? lifeInShort(view.life) : 'No life told yet',
      view.life
        ? `${formatPercent(view.life.leftAtReachFraction.estimate)} left at ${formatYears(view.life.reachYears)}, measured`
        : '',
    ],
    curve: view.curve,
    foot: pool.evidence
      ? `From ${formatCount(pool.evidence.banks)} banks of the pool, at the standard use`
      : '',
  });

/** The same for the list. */
export const listPicture = ({ pool, cells }: CellList): Promise<Buffer> =>
  draw({
    title: 'How long home battery cells last',
    lines: [
      pool.evidence
        ? `${formatCount(pool.evidence.checks)} checks on ${formatCount(pool.evidence.banks)} banks, measured by their owners`
        : 'Measured by their owners',
      `${formatCount(cells.length)} cell types, beside what their labels say`,
    ],
    curve: [],
    foot: '',
  });

interface Drawn {
  title: string;
  lines: readonly string[];
  curve: readonly CurvePoint[];
  foot: string;
}

async function draw({ title, lines, curve, foot }: Drawn): Promise<Buffer> {
  await fontsReady();
  const text = (x: number, y: number, px: number, words: string, look = '') =>
    `<text x="${x}" y="${y}" font-size="${px}" ${look}>${escapeHtml(words)}</text>`;
  const picture = `<svg xmlns="http://www.w3.org/2000/svg" width="${size.width}" height="${size.height}" font-family="Schibsted Grotesk, sans-serif" fill="${colour.ink}">
    <rect width="100%" height="100%" fill="${colour.paper}"/>
    <g transform="translate(60 40) scale(1.5)"><path d="${mark}" fill="${colour.tide}"/></g>
    ${text(124, 78, 34, 'Ebbline', 'font-weight="700"')}
    ${text(60, 168, title.length > 26 ? 52 : 68, title, 'font-weight="700"')}
    ${lines.map((line, i) => text(60, 222 + 40 * i, 31, line, i === 0 ? '' : `fill="${colour.quiet}"`)).join('')}
    ${curvePart(curve)}
    ${text(60, 610, 24, foot, `fill="${colour.quiet}"`)}
  </svg>`;
  return sharp(Buffer.from(picture)).png({ compressionLevel: 9, palette: true }).toBuffer();
}

/** Solid where measured, dashed where projected; what is extrapolated is left out of so small a picture. */
function curvePart(curve: readonly CurvePoint[]): string {
  const told = curve.filter(({ status }) => status === 'measured' || status === 'projected');
  const last = told.at(-1);
  if (!last) return '';
  const x = (years: number) => plot.left + (years / last.years) * (plot.right - plot.left);
  const y = (share: number) => plot.bottom - ((Math.max(0.7, share) - 0.7) / 0.32) * (plot.bottom - plot.top);
  const path = (points: readonly CurvePoint[]) =>
    `M${points.map((point) => `${x(point.years).toFixed(1)} ${y(point.sohFraction).toFixed(1)}`).join('L')}`;
  const measured = told.filter(({ status }) => status === 'measured');
  const projected = [...measured.slice(-1), ...told.filter(({ status }) => status === 'projected')];
  const line = (d: string, dash: string) =>
    `<path d="${d}" fill="none" stroke="${colour.tide}" stroke-width="6" ${dash}/>`;
  return `<line x1="${plot.left}" x2="${plot.right}" y1="${y(0.8)}" y2="${y(0.8)}" stroke="${colour.ink}" stroke-width="2"/>
    <text x="${plot.left - 8}" y="${y(0.8) + 8}" font-size="24" text-anchor="end" fill="${colour.quiet}">80</text>
    <text x="${plot.left - 8}" y="${y(1) + 8}" font-size="24" text-anchor="end" fill="${colour.quiet}">100</text>
    <line x1="${plot.left}" x2="${plot.right}" y1="${y(1)}" y2="${y(1)}" stroke="${colour.line}" stroke-width="2"/>
    ${line(path(measured), '')}${projected.length > 1 ? line(path(projected), 'stroke-dasharray="18 12"') : ''}
    <text x="${plot.right}" y="${plot.bottom + 30}" font-size="24" text-anchor="end" fill="${colour.quiet}">${escapeHtml(formatYears(last.years, 0))}</text>`;
}

const fontFiles = {
  'Schibsted Grotesk': 'schibsted-grotesk/400Regular/SchibstedGrotesk_400Regular.ttf',
  'Schibsted Grotesk Bold': 'schibsted-grotesk/700Bold/SchibstedGrotesk_700Bold.ttf',
};
let fonts: Promise<unknown> | undefined;

/**
 * Drawing a word with a font's file makes the file known to everything that is drawn later. What is drawn is our own
 * SVG from memory, which the decoder otherwise refuses: photos people send are read from files, where it still does.
 */
function fontsReady(): Promise<unknown> {
  sharp.unblock({ operation: ['VipsForeignLoadSvgBuffer'] });
  fonts ??= Promise.all(
    Object.entries(fontFiles).map(([font, file]) => {
      const fontfile = join(
        require.resolve('@expo-google-fonts/schibsted-grotesk/package.json'),
        '../..',
        file,
      );
      return sharp({ text: { text: 'Ebbline', font, fontfile } })
        .png()
        .toBuffer();
    }),
  );
  return fonts;
}

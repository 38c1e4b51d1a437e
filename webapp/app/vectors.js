// A figure as a drawing for paper: the same document as on the screen, drawn as lines and letters instead of pixels, in the
// light scheme, on white. Knows how BokehJS draws SVG; it stands apart from the page, where nobody sees it.

import { bokeh } from './bokeh.js';
import { fill, namesOf } from './figures.js';

const WIDTH_PX = 660; // as wide as the text of an A4 page
const HEIGHTS_PX = { 'blind-zones': 280, dwell: 150 };
const HEIGHT_PX = 212; // three with their captions to a page
const FINE = 2; // cells along each side of a pixel of a map, some 200 an inch
const PAPER = '#fdfcf9'; // the screen's own; on paper it is the paper

const drawn = new Map();

// Where a figure is drawn, and how large its plot is there: what its picture is to be asked for.
export async function placeFor(name, item) {
  if (!drawn.has(name)) drawn.set(name, await mounted(name, item));
  const { width, height } = drawn.get(name).view.frame.bbox;
  return { width: Math.round(width), height: Math.round(height), fine: FINE };
}

// The drawing as SVG text, of the picture given, or as the document was made.
export async function drawing(name, picture) {
  const figure = drawn.get(name);
  if (picture?.columns) fill(name, figure, picture);
  await settled(figure.view);
  const svg = figure.view.export('svg', false).ctx.get_svg();
  sharpen(svg, figure.view);
  return new XMLSerializer().serializeToString(svg).replace(/ width="(\d+)" height="(\d+)"/, ' viewBox="0 0 $1 $2"');
}

// BokehJS makes a map as coarse as a screen when it draws SVG; here it gets all its cells back.
function sharpen(svg, view) {
  const maps = view.renderer_views.values().toArray().map(({ glyph }) => glyph?.image_data?.[0]).filter(Boolean);
  svg.querySelectorAll('image[preserveAspectRatio]').forEach((image, i) => {
    image.setAttribute('href', maps[i].toDataURL());
    image.setAttribute('image-rendering', 'pixelated');
  });
}

async function mounted(name, item) {
  const Bokeh = await bokeh();
  const place = document.body.appendChild(document.createElement('div'));
  Object.assign(place, { className: 'drawing-place', inert: true });
  place.style.cssText = `width: ${WIDTH_PX}px; height: ${HEIGHTS_PX[name] ?? HEIGHT_PX}px`;
  const asSvg = JSON.stringify(item).replaceAll('"output_backend":"canvas"', '"output_backend":"svg"').replaceAll(PAPER, '#ffffff');
  const { roots: [view] } = await Bokeh.embed.embed_item(JSON.parse(asSvg), place);
  return { view, named: namesOf([...view.model.references()]), said: {} };
}

// What was changed is drawn with the next frames; a page in the background has none and draws by the clock.
function settled(view) {
  const frames = new Promise((resolve) => { requestAnimationFrame(() => requestAnimationFrame(resolve)); });
  const patience = new Promise((resolve) => { setTimeout(resolve, 250); });
  return Promise.all([view.ready, Promise.race([frames, patience])]);
}

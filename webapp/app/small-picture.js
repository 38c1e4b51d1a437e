// A small picture of a plan's blind zones on a canvas of its own. Knows the colours of the map's classes, nothing of plans.

const DARK = matchMedia('(prefers-color-scheme: dark)');
const drawn = new Set();

// `image` is a typed array of classes with its `shape`, the lowest speed first; `colours` is [light, dark] for each class.
export function smallPicture(image, colours, label) {
  const [height, width] = image.shape;
  const canvas = document.createElement('canvas');
  Object.assign(canvas, { width, height, className: 'small-picture' });
  canvas.setAttribute('role', 'img');
  canvas.setAttribute('aria-label', label);
  const paint = () => fill(canvas, image, colours.map((pair) => pair[isDark() ? 1 : 0]));
  paint();
  drawn.add({ canvas, paint });
  return canvas;
}

DARK.addEventListener('change', () => {
  for (const one of drawn) {
    if (one.canvas.isConnected) one.paint();
    else drawn.delete(one);
  }
});

function isDark() {
  const { theme } = document.documentElement.dataset;
  return theme ? theme === 'dark' : DARK.matches;
}

function fill(canvas, image, colours) {
  const { width, height } = canvas;
  const pen = canvas.getContext('2d');
  const cells = pen.createImageData(width, height);
  const rgb = colours.map((text) => [1, 3, 5].map((at) => Number.parseInt(text.slice(at, at + 2), 16)));
  for (let row = 0; row < height; row += 1) {
    for (let column = 0; column < width; column += 1) {
      const at = 4 * ((height - 1 - row) * width + column); // speeds rise upwards
      cells.data.set([...rgb[image[row * width + column]], 255], at);
    }
  }
  pen.putImageData(cells, 0, 0);
}

"""The figures on the screen: mounted once, then only data, ends, labels and colours change. Without page and engine."""

import base64
import io
import re
from pathlib import Path

import bokeh
import pytest
from PIL import Image
from playwright.sync_api import expect

from pycore import columns
from pycore.columns.mark import marked
from pycore.columns.view import View
from pycore.computed import Computed
from pycore.plan.reading import read
from pycore.wording import SHOWN_UNITS
from webapp import figures
from webapp.engine.bridge import packed
from webapp.figures.palette import PALETTE, SCHEMES

APP = Path(__file__).parents[2] / 'webapp' / 'app'
BOKEH_JS = Path(bokeh.__file__).parent / 'server' / 'static' / 'js' / 'bokeh.min.js'
PAGE = (
    '<!doctype html><body style="margin: 0; height: 3000px"><div id="plot" style="height: 320px; width: 640px"></div>'
)
SIZE = {'width': 580, 'height': 270}
TARGET = {'range_km': 57.0, 'speed_mps': 150.0}
SHOW = """
async ({ name, item, text, bytes, scheme }) => {
  if (scheme) figuresUnderTest.setScheme(scheme);
  await figuresUnderTest.mount(name, document.getElementById('plot'), item);
  window.pictureOf = ({ text, bytes }) =>
    figuresUnderTest.revived(text, Uint8Array.from(atob(bytes), (c) => c.charCodeAt(0)).buffer);
  figuresUnderTest.update(name, pictureOf({ text, bytes }));
}
"""
LISTEN = """
(name) => {
  const { pointIn, geometry } = figuresUnderTest;
  pointIn(document.getElementById('plot'), geometry(name), {
    drags: () => true,
    onPick: (...place) => { window.picked = place; },
    onHover: (...place) => { window.hovered = place; },
    onDrag: () => {},
    onNumber: (i) => { window.numbered = i; },
  });
}
"""
PAINTED = '() => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve)))'


def document(pri_us, kind='dwells'):
    return {
        'coverage': {'range_km': [2.0, 110.0], 'speed_mps': [0.0, 300.0]},
        'waveform': {'kind': kind, 'pri_us': pri_us, 'pulses': 20, 'detect_m': 1},
        'doppler': {'notch_mps': 20.0},
    }


def picture_of(name, plan):
    return columns.picture(name, Computed(read(plan)), SHOWN_UNITS, SIZE)


def sent(picture):
    text, arrays = packed(picture)
    return {'text': text, 'bytes': base64.b64encode(arrays).decode()}


@pytest.fixture
def blank(chrome):
    """Return a page that has BokehJS and figures.js, and fails the test on any error in it."""
    page = chrome.new_page(viewport={'width': 800, 'height': 600})
    errors = []
    page.on('pageerror', lambda error: errors.append(str(error)))
    page.on('console', lambda message: errors.append(message.text) if message.type == 'error' else None)
    page.set_content(PAGE)
    page.add_script_tag(path=BOKEH_JS)
    modules = ''.join((APP / name).read_text(encoding='utf-8') for name in ('figures.js', 'pointing.js', 'arrays.js'))
    names = 'mount, update, setScheme, geometry, pointIn, sizes, revived'
    modules = re.sub(r'^export |^import .*\n', '', modules, flags=re.M)
    page.add_script_tag(
        content=f'const bokeh = () => globalThis.Bokeh;\n{modules}\nwindow.figuresUnderTest = {{ {names} }};'
    )
    yield page
    page.close()
    assert not errors


def show(page, name, plan, scheme=None):
    picture = picture_of(name, plan)
    page.evaluate(SHOW, {'name': name, 'item': figures.build(name, picture), 'scheme': scheme, **sent(picture)})


def colours_up(page):
    """The colours half way along the range, from the bottom of the figure up."""
    page.evaluate(PAINTED)
    shot = Image.open(io.BytesIO(page.screenshot())).convert('RGB')
    return [shot.getpixel((330, y)) for y in range(319, -1, -1)]


def notch_and_above(page, scheme):
    """Whether the notch around zero is ink, and how many pixels above it are paper."""
    colours = colours_up(page)
    first = colours.index(rgb_of('ink', scheme))
    return first < 60, colours[first:].count(rgb_of('paper', scheme))


def rgb_of(role, scheme):
    return tuple(int(PALETTE[role][SCHEMES.index(scheme)][i : i + 2], 16) for i in (1, 3, 5))


@pytest.mark.parametrize('name', columns.FIGURES)
def test_every_figure_takes_a_plan_of_the_other_kind(blank, name):
    show(blank, name, document([980.0, 860.0]))
    blank.evaluate(
        '([name, data]) => figuresUnderTest.update(name, pictureOf(data))',
        [name, sent(picture_of(name, document([950.0, 1140.0, 1026.0], 'stagger')))],
    )
    assert blank.evaluate('(name) => figuresUnderTest.sizes()[name].width', name) > 400


@pytest.mark.parametrize('scheme', ['light', 'dark'])
def test_the_notch_is_ink_and_what_both_see_is_paper_in_either_scheme(blank, scheme):
    show(blank, 'blind-zones', document([980.0, 981.0]), scheme)
    is_ink, paper = notch_and_above(blank, scheme)
    assert is_ink
    assert paper > 40


def test_a_change_of_scheme_repaints_a_mounted_figure(blank):
    show(blank, 'blind-zones', document([980.0, 981.0]))
    blank.evaluate('() => figuresUnderTest.setScheme("dark")')
    assert notch_and_above(blank, 'dark')[0]


def test_a_click_tells_where_it_was_in_the_units_of_the_axes(blank):
    show(blank, 'blind-zones', document([980.0, 860.0]))
    blank.evaluate(LISTEN, 'blind-zones')
    size = blank.evaluate('() => figuresUnderTest.sizes()["blind-zones"]')
    blank.mouse.click(629, 150)
    x, y = blank.evaluate('() => window.picked')
    assert x == pytest.approx(110, abs=2 * 108 / size['width'])
    assert 100 < y < 200


def test_under_the_map_of_detection_a_pointer_has_a_range_and_no_speed(blank):
    show(blank, 'detection', document([980.0, 860.0]))
    blank.evaluate(LISTEN, 'detection')
    blank.mouse.move(330, 60)
    assert 150 < blank.evaluate('() => window.hovered[1]') < 300
    blank.mouse.move(330, 250)
    x, y = blank.evaluate('() => window.hovered')
    assert 40 < x < 70
    assert y is None


def test_a_followed_target_is_marked_in_the_colour_of_lines(blank):
    picture = columns.picture(
        'blind-zones',
        computed := Computed(read(document([980.0, 860.0]))),
        SHOWN_UNITS,
        SIZE,
        View(mark=marked(computed, TARGET)),
    )
    show(blank, 'blind-zones', document([980.0, 860.0]))
    assert rgb_of('line', 'light') not in colours_up(blank)
    blank.evaluate('([name, data]) => figuresUnderTest.update(name, pictureOf(data))', ['blind-zones', sent(picture)])
    blank.evaluate('() => figuresUnderTest.setScheme("light")')
    assert rgb_of('line', 'light') in colours_up(blank)


def test_leaving_the_plot_ends_the_hover(blank):
    show(blank, 'blind-zones', document([980.0, 860.0]))
    blank.evaluate(LISTEN, 'blind-zones')
    blank.mouse.move(300, 150)
    assert blank.evaluate('() => window.hovered[0]') == pytest.approx(56, abs=10)
    blank.mouse.move(300, 500)
    assert blank.evaluate('() => window.hovered') == [None, None]


def test_the_canvas_is_no_tab_stop(blank):
    show(blank, 'blind-zones', document([980.0, 860.0]))
    blank.keyboard.press('Tab')
    assert blank.evaluate('() => document.activeElement.tagName') == 'BODY'


def test_the_wheel_scrolls_the_page_and_not_the_figure(blank):
    show(blank, 'blind-zones', document([980.0, 860.0]))
    blank.mouse.move(300, 150)
    blank.mouse.wheel(0, 120)
    expect(blank.locator('#plot')).not_to_be_in_viewport(ratio=1)


def test_a_figure_follows_the_width_of_its_place(blank):
    show(blank, 'trade-line', document([980.0, 860.0]))
    before = blank.evaluate('() => figuresUnderTest.sizes()["trade-line"].width')
    blank.evaluate('() => { document.getElementById("plot").style.width = "360px"; }')
    blank.evaluate('() => new Promise((resolve) => setTimeout(resolve, 300))')
    after = blank.evaluate('() => figuresUnderTest.sizes()["trade-line"].width')
    assert before - after == pytest.approx(280, abs=12)


def test_a_built_document_shows_its_map_before_any_update(blank):
    item = figures.build('blind-zones', picture_of('blind-zones', document([980.0, 981.0])))
    blank.evaluate('(item) => figuresUnderTest.mount("blind-zones", document.getElementById("plot"), item)', item)
    assert notch_and_above(blank, 'light')[0]

"""A number of the note is changed as a person does it, and what the note then says is what the command line prints."""

import json
import subprocess
import sys
from pathlib import Path

import pytest
from playwright.sync_api import expect

ROOT = Path(__file__).parents[2]
PULSE = 'radar.pulse_us'
FAR = 'coverage.range_km.1'


@pytest.fixture
def live(note):
    """Return the note with its engine ready."""
    return note.open().ready()


def opening_plan(note):
    return json.loads(note.page.locator('#opening').text_content())['answer']['plan']


def assessed(plan):
    """Return what the command line prints of a plan: the findings' values by name."""
    command = [sys.executable, '-m', 'pycore', 'assess', '-', '--json']
    done = subprocess.run(command, input=json.dumps(plan), capture_output=True, check=True, cwd=ROOT, text=True)

    return {finding['name']: finding['value'] for finding in json.loads(done.stdout)['findings']}


def numbers(value):
    """Return a finding's value as a list of floats: none, one, or the two ends of an interval."""
    parts = [] if value is None else value if isinstance(value, list) else [value]

    return [float(part) for part in parts]


def on_the_page(note):
    """Return the values that the findings carry, by name."""
    items = note.page.get_by_role('region', name='What it can do').get_by_role('listitem').all()
    texts = {item.get_attribute('data-finding'): item.get_attribute('data-value') for item in items}

    return {name: [float(part) for part in text.split()] for name, text in texts.items()}


def shown(note, count):
    """Wait until so many committed edits are painted."""
    expect(note.root).to_have_attribute('data-shown', str(count))


def drag(note, key, pixels):
    """Drag a number sideways with the mouse."""
    box = note.number(key).bounding_box()
    x, y = box['x'] + box['width'] / 2, box['y'] + box['height'] / 2
    note.page.mouse.move(x, y)
    note.page.mouse.down()
    note.page.mouse.move(x + pixels, y, steps=abs(pixels) // 4)
    note.page.mouse.up()


def test_findings_after_an_edit_are_exactly_what_the_command_line_prints(live):
    plan = opening_plan(live)
    plan['radar']['pulse_us'] = 1.7
    live.commit(PULSE, '1.7')
    expect(live.finding('detection')).not_to_have_attribute(
        'data-value', ''
    )  # it takes long, and comes after the others

    assert on_the_page(live) == {name: numbers(value) for name, value in assessed(plan).items()}


def test_two_fast_edits_end_with_the_result_of_the_second(live):
    plan = opening_plan(live)
    plan['radar']['pulse_us'] = 40
    for text in ('3', '40'):
        live.number(PULSE).click()
        live.page.keyboard.type(text)
        live.page.keyboard.press('Enter')
    shown(live, 2)

    assert on_the_page(live)['visible'] == numbers(assessed(plan)['visible'])


def test_an_edit_before_the_engine_is_ready_waits_for_it(note):
    note.open()
    note.number(PULSE).click()
    note.page.keyboard.type('1.7')
    note.page.keyboard.press('Enter')

    expect(note.page.get_by_text('waiting for the engine')).to_be_visible()
    note.ready()
    shown(note, 1)
    expect(note.number(PULSE)).to_have_text('1.7\u202fµs')


def test_typed_digits_change_nothing_until_they_are_committed(live):
    live.number(PULSE).click()
    live.page.keyboard.type('1.7')

    shown(live, 0)
    live.page.keyboard.press('Escape')
    expect(live.number(PULSE)).to_have_text('1.0\u202fµs')
    expect(live.number(PULSE)).to_be_focused()


@pytest.mark.parametrize(
    ('text', 'became'),
    [('1,2', '1.2'), ('1200 ns', '1.2'), ('0.0012ms', '1.2'), ('1.2 us', '1.2'), ('+20%', '1.2'), ('-10%', '0.9')],
)
def test_a_pulse_length_may_be_typed_in_many_ways(live, text, became):
    live.commit(PULSE, text)

    expect(live.number(PULSE)).to_have_text(f'{became}\u202fµs')


def test_a_pri_typed_as_a_frequency_is_rounded_to_the_clock_and_says_so(live):
    live.commit('waveform.pri_us.0', '900 Hz')

    expect(live.number('waveform.pri_us.0')).to_have_text('1111.1')
    expect(live.page.get_by_role('status')).to_contain_text('on the 10 MHz clock 1111.1 µs')


@pytest.mark.parametrize(
    ('keys', 'became'),
    [('ArrowUp', '111'), ('ArrowDown', '109'), ('Shift+ArrowUp', '120'), ('Alt+ArrowUp', '110.1')],
)
def test_arrows_step_a_number(live, keys, became):
    live.number(FAR).focus()
    live.page.keyboard.press(keys)

    expect(live.number(FAR)).to_have_text(f'{became}\u202fkm')
    shown(live, 1)


@pytest.mark.parametrize('keys', ['PageUp', 'PageDown', 'Home', 'End'])
def test_keys_that_scroll_never_change_a_number(live, keys):
    live.number(FAR).focus()
    live.page.keyboard.press(keys)

    expect(live.number(FAR)).to_have_text('110\u202fkm')
    shown(live, 0)


def test_fifty_arrow_steps_keep_the_focus_and_are_one_step_of_undo(live):
    live.number(FAR).focus()
    for _ in range(50):
        live.page.keyboard.press('ArrowUp')
    shown(live, 50)

    expect(live.number(FAR)).to_be_focused()
    expect(live.number(FAR)).to_have_text('160\u202fkm')
    live.page.keyboard.press('Control+z')
    expect(live.number(FAR)).to_have_text('110\u202fkm')


def test_a_drag_of_forty_pixels_is_ten_steps_and_one_step_of_undo(live):
    drag(live, FAR, 40)

    expect(live.number(FAR)).to_have_text('120\u202fkm')
    live.page.get_by_role('button', name='Undo').first.click()
    expect(live.number(FAR)).to_have_text('110\u202fkm')


def test_escape_takes_a_drag_back(live):
    box = live.number(FAR).bounding_box()
    live.page.mouse.move(box['x'] + 5, box['y'] + 5)
    live.page.mouse.down()
    live.page.mouse.move(box['x'] + 45, box['y'] + 5, steps=10)
    live.page.keyboard.press('Escape')
    live.page.mouse.up()

    expect(live.number(FAR)).to_have_text('110\u202fkm')
    expect(live.page.get_by_role('button', name='Undo').first).to_be_disabled()


def test_a_step_stops_at_the_limit_and_the_limit_is_said(live):
    live.commit('doppler.notch_mps', '0')
    live.number('doppler.notch_mps').press('ArrowDown')

    expect(live.number('doppler.notch_mps')).to_have_text('0\u202fm/s')
    expect(live.page.get_by_role('status')).to_contain_text('ends at 0')


@pytest.mark.parametrize('text', ['', 'abc', 'nan', 'inf', '-1', '1e9', '1,200', '1 kg', '<b>1</b>'])
def test_a_refused_number_stays_as_it_was_typed_and_says_what_would_be_right(live, text):
    live.number(PULSE).click()
    live.number(PULSE).fill(text)
    live.page.keyboard.press('Enter')
    refused = live.page.get_by_role('group', name='Numbers that were refused')

    expect(live.number(PULSE)).to_have_attribute('aria-invalid', 'true')
    expect(live.number(PULSE)).to_have_text(text)
    expect(refused).to_contain_text('Pulse length')
    expect(refused).to_contain_text('Everything below still shows 1.0\u202fµs.')
    expect(live.finding('visible')).to_have_attribute('data-value', str(assessed(opening_plan(live))['visible']))


def test_a_refused_number_is_put_back_on_request(live):
    live.number(PULSE).click()
    live.page.keyboard.type('abc')
    live.page.keyboard.press('Tab')
    live.page.get_by_role('button', name='Put back').click()

    expect(live.number(PULSE)).to_have_text('1.0\u202fµs')
    expect(live.page.get_by_role('group', name='Numbers that were refused')).to_be_hidden()


def test_while_a_number_is_refused_the_rest_stays_live(live):
    live.number(PULSE).click()
    live.page.keyboard.type('abc')
    live.page.keyboard.press('Tab')
    live.commit('doppler.notch_mps', '8')

    expect(live.number(PULSE)).to_have_text('abc')
    expect(live.finding('visible')).not_to_have_attribute('data-value', str(assessed(opening_plan(live))['visible']))


def test_an_interval_may_be_moved_one_end_after_the_other(live):
    live.number('coverage.range_km.0').click()
    live.page.keyboard.type('120')
    live.page.keyboard.press('Enter')

    expect(live.number(FAR)).to_have_attribute('aria-invalid', 'true')
    live.commit(FAR, '140')
    expect(live.number('coverage.range_km.0')).to_have_text('120')
    expect(live.page.get_by_role('group', name='Numbers that were refused')).to_be_hidden()
    live.page.keyboard.press('Control+z')
    expect(live.number(FAR)).to_have_text('110\u202fkm')
    expect(live.number('coverage.range_km.0')).to_have_text('2')


def test_undo_and_redo_name_what_they_did(live):
    live.commit(PULSE, '1.7')
    live.page.keyboard.press('Control+z')

    expect(live.number(PULSE)).to_have_text('1.0\u202fµs')
    expect(live.page.get_by_role('status')).to_contain_text('Pulse length back to 1.0\u202fµs.')
    live.page.get_by_role('status').get_by_role('button', name='Redo').click()
    expect(live.number(PULSE)).to_have_text('1.7\u202fµs')


def test_prfs_pasted_on_the_opening_example_make_a_plan_and_say_what_it_leans_on(live):
    live.page.get_by_label('Your own plan').fill('1020, 1163, 1250 Hz')
    live.page.keyboard.press('Enter')

    expect(live.number('waveform.pri_us.2')).to_have_text('800\u202fµs')
    expect(live.page.get_by_text('Assumed until you say otherwise')).to_contain_text('pulse length 1.0\u202fµs')


def test_more_than_four_pris_stand_in_a_rail_that_grows_and_shrinks(live):
    for _ in range(3):
        live.page.get_by_role('button', name='Add a PRI').click()
    last = live.number('waveform.pri_us.4')

    expect(last).to_be_focused()
    live.page.keyboard.press('Delete')
    live.page.keyboard.press('Delete')
    expect(last).to_have_count(0)


def test_a_remark_accepts_a_finding_that_is_not_met(live):
    finding = live.finding('must-see.0')
    finding.get_by_role('button', name='Say why').click()
    finding.get_by_role('textbox').fill('The site radar covers it.')
    finding.get_by_role('textbox').press('Enter')

    expect(finding).to_have_attribute('data-met', 'accepted')
    expect(finding).to_contain_text('not met, accepted: The site radar covers it.')

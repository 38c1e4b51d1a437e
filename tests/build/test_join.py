"""Joining ES modules into one classic script."""

import pytest

from webapp.building.join import joined, ordered
from webapp.building.stop import Stop


@pytest.fixture
def modules(tmp_path):
    """Return a function that writes modules and gives their folder."""

    def write(**texts):
        for name, text in texts.items():
            (tmp_path / f'{name.replace("_", "-")}.js').write_text(text)
        return tmp_path

    return write


def test_what_a_module_needs_runs_before_it(modules):
    folder = modules(
        main="import { a } from './a.js';\na();",
        a="import { b } from './b.js';\nexport function a() { b(); }",
        b='export const b = () => 1;',
    )

    assert ordered(folder, 'main.js') == ['b.js', 'a.js', 'main.js']


def test_a_module_that_two_need_runs_once(modules):
    folder = modules(
        main="import { a } from './a.js';\nimport { b } from './b.js';\na(b);",
        a="import { b } from './b.js';\nexport function a() { b(); }",
        b='export const b = () => 1;',
    )

    assert joined(folder, 'main.js').count('const b = () => 1;') == 1


def test_equal_names_in_two_modules_do_not_meet(modules):
    folder = modules(
        main="import { a } from './a.js';\nconst own = 2;\na(own);",
        a='const own = 1;\nexport async function a() { return own; }',
    )

    script = joined(folder, 'main.js')

    assert script.index('const own = 1;') < script.index('return { a };') < script.index('const own = 2;')


def test_no_module_syntax_is_left(modules):
    folder = modules(
        main="import {\n  a,\n  b as other,\n} from './a-b.js';\na(other);",
        a_b='export class a {}\nexport const b = 1;\n',
    )

    script = joined(folder, 'main.js')

    assert 'const { a, b: other } = $a$b;' in script
    assert 'import' not in script
    assert 'export' not in script


@pytest.mark.parametrize(
    'text',
    [
        'export default 1;',
        'export let a = 1;',
        'export { a };',
        "export * from './a.js';",
        "import a from './a.js';",
        "import * as a from './a.js';",
        "import './a.js';",
        "const a = await import('./a.js');",
        'const here = import.meta.url;',
        'await Promise.resolve();',
        "const end = '</script>';",
    ],
)
def test_syntax_that_is_not_known_stops_the_build(modules, text):
    with pytest.raises(Stop, match='main.js has'):
        joined(modules(main=text, a='export const a = 1;'), 'main.js')


def test_a_name_that_is_not_exported_stops_the_build(modules):
    folder = modules(main="import { b } from './a.js';\nb();", a='export const a = 1;')

    with pytest.raises(Stop, match='imports b from a.js'):
        joined(folder, 'main.js')


def test_a_ring_of_imports_stops_the_build(modules):
    folder = modules(
        main="import { a } from './a.js';\nexport const m = a;", a="import { m } from './main.js';\nexport const a = m;"
    )

    with pytest.raises(Stop, match='main.js -> a.js -> main.js'):
        joined(folder, 'main.js')


def test_a_module_that_does_not_exist_is_named(modules):
    with pytest.raises(Stop, match='needs gone.js'):
        joined(modules(main="import { a } from './gone.js';\na();"), 'main.js')

"""What was built: sizes, licences, and that it asks nothing of any host."""

import re

import pytest

from webapp.building.places import DIST, ROOT

MEGABYTE = 1e6
HOSTED_LIMIT, SINGLE_LIMIT = 12 * MEGABYTE, 16 * MEGABYTE  # the budgets for bytes until ready, and for the one file

# Addresses of registries and content networks; joined here so that this file does not hold them.
HOSTS = tuple(
    '.'.join(parts) for parts in (('pypi', 'org'), ('pythonhosted', 'org'), ('npmjs', 'com'), ('jsdelivr', 'net'))
)


@pytest.fixture(scope='module')
def built():
    """Return the files of dist/."""
    if not (DIST / 'index.html').is_file():
        pytest.fail('dist/ is not built: run build.py first.')
    return {path.name: path for path in DIST.iterdir()}


def test_the_hosted_page_is_within_its_budget_until_it_is_ready(built):
    size = sum(path.stat().st_size for name, path in built.items() if name.endswith('.js') or name == 'index.html')

    assert size <= HOSTED_LIMIT


def test_the_single_file_is_within_its_budget(built):
    assert built['pulsewright.html'].stat().st_size <= SINGLE_LIMIT


@pytest.mark.parametrize(
    'owner', ['Mozilla Public License', 'PYTHON SOFTWARE FOUNDATION LICENSE', 'NumPy Developers', 'Anaconda']
)
def test_the_licence_of_each_shipped_part_is_in_both_outputs(built, owner):
    assert owner in built['licences.txt'].read_text()
    assert owner in built['pulsewright.html'].read_text().rsplit('id="licences"', 1)[1]


def test_what_was_changed_in_other_peoples_files_is_said(built):
    assert 'export default _createPyodideModule; -> (nothing)' in built['licences.txt'].read_text()


def test_the_page_takes_nothing_from_another_address(built):
    for name in ('index.html', 'pulsewright.html'):
        page = built[name].read_text().split('id="opening"')[0]
        assert re.findall(r'(?:src|href)="(?!data:|#)[^"]*:', page) == []


def test_scripts_are_named_after_their_contents(built):
    assert all(re.fullmatch(r'\w+-[0-9a-f]{10}\.js', name) for name in built if name.endswith('.js'))


def test_no_source_names_a_registry():
    folders = [path for name in ('pycore', 'webapp', 'tests') for path in (ROOT / name).rglob('*')]
    texts = [
        path
        for path in [ROOT / 'build.py', ROOT / 'pyproject.toml', *folders]
        if path.suffix in ('.py', '.js', '.mjs', '.toml', '.html')
    ]

    assert [path for path in texts for host in HOSTS if host in path.read_text(encoding='utf-8')] == []

"""Joining Pyodide's modules: only the release that this build knows."""

import pytest

from webapp.building.pyodide import CHANGES, changed
from webapp.building.stop import Stop


def test_each_piece_is_replaced_where_it_stands(tmp_path):
    path = tmp_path / 'pyodide.mjs'
    path.write_text('var dt;export{dt as loadPyodide,U as version};\n//# sourceMappingURL=pyodide.mjs.map')

    assert changed(path) == 'var dt;return {loadPyodide:dt,version:U};\n'


@pytest.mark.parametrize('text', ['var dt;', 2 * CHANGES['pyodide.mjs'][0][0]])
def test_another_release_stops_the_build(tmp_path, text):
    path = tmp_path / 'pyodide.mjs'
    path.write_text(text + CHANGES['pyodide.mjs'][1][0])

    with pytest.raises(Stop, match='is not the release this build knows'):
        changed(path)

"""Join Pyodide's two modules and our worker into one that imports nothing, so that the strictest policy lets it run.

What is changed in Pyodide's files is written here, and each piece must be found exactly as often as said: another
release stops the build instead of breaking the page.
"""

from webapp.building.join import joined
from webapp.building.stop import Stop

# file: (piece, how often, what stands there instead)
CHANGES = {
    'pyodide.asm.mjs': (
        ('import.meta.url', 3, '"https://pulsewright.invalid/pyodide.asm.mjs"'),
        ('export default _createPyodideModule;', 1, ''),
    ),
    'pyodide.mjs': (
        ('export{dt as loadPyodide,U as version};', 1, 'return {loadPyodide:dt,version:U};'),
        ('//# sourceMappingURL=pyodide.mjs.map', 1, ''),
    ),
}
LEFT_OVER = ('import.meta', 'export{', 'export default')


def worker_module(runtime, worker):
    """Return the text of the worker: Pyodide's modules, then ours.

    Parameters
    ----------
    runtime : Path
        The folder of Pyodide's files. [unitless]
    worker : Path
        Our worker.js. [unitless]

    Returns
    -------
    text : str
        One module without imports.
    """
    machine = changed(runtime / 'pyodide.asm.mjs')
    loader = changed(runtime / 'pyodide.mjs')

    return '\n'.join(
        (
            '// Pyodide (MPL-2.0), its two modules joined; what was changed is said in licences.txt.',
            machine,
            f'const createPyodideModule = _createPyodideModule;\nconst {{ loadPyodide }} = (() => {{\n{loader}\n}})();',
            joined(worker.parent, worker.name),
        )
    )


def changed(path):
    """Return the text of one of Pyodide's modules with the changes made that joining needs.

    Parameters
    ----------
    path : Path
        The module as released. [unitless]

    Returns
    -------
    text : str
        Without exports and without its own address.
    """
    text = path.read_text(encoding='utf-8')
    for piece, times, instead in CHANGES[path.name]:
        if text.count(piece) != times:
            raise Stop(
                f'{path.name} has "{piece}" {text.count(piece)} times, not {times}: '
                'it is not the release this build knows.'
            )
        text = text.replace(piece, instead)
    for piece in LEFT_OVER:
        if piece in text:
            raise Stop(f'{path.name} still has "{piece}" after joining: it is not the release this build knows.')

    return text

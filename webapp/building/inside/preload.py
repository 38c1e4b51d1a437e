"""Run inside Pyodide just before its memory is kept: import modules of the library, but not numpy.

Their names are in `words`. Reads no file: when a file was last read would be in the memory.
"""

import gc
import importlib

for name in words:  # noqa: F821 - set by workshop.mjs
    importlib.import_module(name)
del words  # noqa: F821
gc.collect()
gc.freeze()

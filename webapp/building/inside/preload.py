"""Run inside Pyodide just before its memory is kept: import the modules named in `words`, which are the library's, not numpy's.

Reads no file: when a file was last read would be in the memory.
"""

import gc
import importlib

for name in words:  # noqa: F821 - set by workshop.mjs
    importlib.import_module(name)
del words  # noqa: F821
gc.collect()
gc.freeze()

"""Run inside Pyodide just before its memory is kept: import the library's modules that the engine takes, but not numpy."""

import gc
import importlib
import json

with open('/job/preload.json') as file:
    for name in json.load(file):
        importlib.import_module(name)
gc.collect()

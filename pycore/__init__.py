"""Pulsewright's computation: what a PRF plan sees, where it is blind, and why.

Pure Python and numpy, without input or output, clock or globals, so that the
same code answers in a browser, on the command line and in a notebook.
Start at :mod:`pycore.api`.
"""

__version__ = '1.0.0'

"""A table of the reader's own, range, speed, seen or not, and how far a plan agrees with it."""

from pycore.own_table.agreement import agreement
from pycore.own_table.reading import read_table

__all__ = ['agreement', 'read_table']

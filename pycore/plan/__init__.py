"""The plan: its table of keys, the document checked and filled, the rules between keys, and its reading in SI units."""

"""What the build has made once is not made again: products in the cache, under the contents they were made of."""

import tempfile
from pathlib import Path

from webapp.building.places import cache, content_key


def made(name, make, *contents):
    """Return a product from the cache, made first if these contents have not been seen.

    Parameters
    ----------
    name : str
        The file that `make` leaves in the folder it is given. [unitless]
    make : function of Path
        Makes it. [unitless]
    *contents : str, bytes or Path
        All that the product depends on. [unitless]

    Returns
    -------
    path : Path
        The product.
    """
    stem, dot, ending = name.partition('.')
    path = cache() / 'made' / f'{stem}-{content_key(*contents)}{dot}{ending}'
    if not path.exists():
        path.parent.mkdir(exist_ok=True)
        with tempfile.TemporaryDirectory(dir=path.parent) as place:
            make(Path(place))
            (Path(place) / name).replace(path)

    return path

"""Sentences about the zones of one axis, in their forms for none, one, two, many and everything."""

from pycore.wording import capitalised, count_word


def zones_sentence(zones, axis, noun, looks, everywhere_clear, whole, before=''):
    """Say which zones are clear on too few PRFs.

    Parameters
    ----------
    zones : float array, shape (Z, 2)
        Their ends. [m or m/s]
    axis : Axis
        The axis they lie on. [m or m/s]
    noun : str
        ``'range'`` or ``'speed'``. [unitless]
    looks : Looks
        What is said of the PRFs. [unitless]
    everywhere_clear : bool
        Whether no PRF is blind anywhere. [unitless]
    whole : float
        Length of the axis on which there could be zones. [m or m/s]
    before : str
        Where the sentence holds, such as ``'outside the notch around zero'``. [unitless]

    Returns
    -------
    sentence : str
        One sentence.
    """
    if not len(zones):
        clear = looks.all_clear if everywhere_clear else looks.enough
        return capitalised(f'{before}, every {noun} is {clear}.'.removeprefix(', '))
    width = zones[:, 1] - zones[:, 0]
    where = f'{before}, ' if before else ''
    if width.sum() >= whole - 1e-9 * (axis.limits[1] - axis.limits[0]):
        return capitalised(f'{where}every {noun} is {looks.too_few}.')
    if len(zones) <= 2:
        listed = ' and '.join(axis.interval(*zone) for zone in zones)
        return capitalised(f'{where}{listed} {"is" if len(zones) == 1 else "are"} {looks.too_few}.')
    widest = axis.interval(*zones[width.argmax()])
    return capitalised(
        f'{where}{count_word(len(zones))} zones, {axis.text(width.sum())} in all, are {looks.too_few}; '
        f'the widest is {widest}.'
    )

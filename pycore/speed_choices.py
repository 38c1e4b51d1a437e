"""What can be chosen for the figure of blind speeds; a view and a link call it alike.

The first of each is what stands there unless a reader chooses.
"""

ALONG = ('speed', 'doppler', 'ratio')
"""Along its axis: the speed, its Doppler frequency, or blind speeds of the mean PRI. [unitless]"""

UP = ('own', 'pri', 'carrier', 'stagger')
"""Up its axis: the plan's own rows or curve, the mean PRI, the carrier, the stagger ratio. [unitless]"""

CHOICES = {'axis': ALONG, 'up': UP}
"""Both by their names in a view. [unitless]"""

"""What all tests share: no drawn example fails because the machine was busy."""

from hypothesis import settings

settings.register_profile('untimed', deadline=None)
settings.load_profile('untimed')

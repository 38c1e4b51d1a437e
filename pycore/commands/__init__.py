"""Commands that need a clock, processes or a cluster; only the command line imports them."""

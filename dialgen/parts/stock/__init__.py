"""Networks of resistors from the drawer: what lies there, and the best of them for a wanted value."""

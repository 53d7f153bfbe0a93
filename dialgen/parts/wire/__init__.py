"""Parts made at home: how much of a wire or strip has the wanted ohms, and how to make and trim it."""

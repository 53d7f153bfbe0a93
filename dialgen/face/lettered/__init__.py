"""Lettering beside the numerals, each set where the plate is free."""

"""Rectifier instruments: what a diode does, how diodes are connected, and the coil's mean current."""

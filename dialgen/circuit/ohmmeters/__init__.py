"""Ohmmeters: the cell, the coil with its adjuster, and their designs."""

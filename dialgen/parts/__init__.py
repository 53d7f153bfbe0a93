"""What to buy, wind and find in the drawer for a circuit that is designed."""

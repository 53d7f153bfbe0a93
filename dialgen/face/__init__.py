"""From a dial to a drawing: divisions, numerals, plate and composition."""

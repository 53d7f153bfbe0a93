"""What to beware of, by what the circuit is."""

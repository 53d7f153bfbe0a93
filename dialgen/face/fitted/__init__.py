"""What is cut out of the plate, and what helps to fit it."""

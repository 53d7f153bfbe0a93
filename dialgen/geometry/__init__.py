"""From a value on the face to a point on the plate: laws, response, correction, scale lines."""

"""The scales as ink: lines, marks, numerals, zones and limits."""

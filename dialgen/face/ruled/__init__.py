"""Where every mark of a scale falls, how large it is and what is said at it; nothing is drawn yet."""

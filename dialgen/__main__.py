"""``python -m dialgen`` does exactly what ``dialgen`` does."""

from dialgen.cli import main

if __name__ == "__main__":
    main()

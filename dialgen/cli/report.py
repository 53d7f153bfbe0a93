"""How the program says that something is wrong: plain lines on standard error, and a status."""

from __future__ import annotations

from collections.abc import Iterable, Sequence

import click

from dialgen.errors import DialFileError, DialgenError, Fault

MOST_LINES = 6
WRONG_INPUT = 2


def guarded(program: click.Command) -> int:
    """Run a click program and return its exit status, with every expected error as plain lines."""
    try:
        result = program.main(prog_name="dialgen", standalone_mode=False)
    except DialgenError as error:
        say_error(error)
        return WRONG_INPUT
    except click.ClickException as error:
        say(_plain(error))
        return WRONG_INPUT
    except (click.Abort, KeyboardInterrupt):
        say("stopped")
        return 130
    except BrokenPipeError:
        # The reader of our output (head, say) has seen enough.
        return 0
    return result if isinstance(result, int) else 0


def say_error(error: DialgenError) -> None:
    """Write an error as one line for each fault: at most six, then how many more."""
    lines = [str(fault) for fault in error.faults] if isinstance(error, DialFileError) else [str(error)]
    say_lines(lines)


def say_warnings(faults: Sequence[Fault]) -> None:
    """Write warnings, marked as such behind their place."""
    for fault in faults:
        key = f"{fault.key}: " if fault.key else ""
        say(f"{fault.file}:{fault.line}:{fault.column}: warning: {key}{fault.message}")


def say_lines(lines: Iterable[str]) -> None:
    """Write lines to standard error, at most six of them."""
    every = list(lines)
    for line in every[:MOST_LINES]:
        say(line)
    if (more := len(every) - MOST_LINES) > 0:
        say(f"and {more} more")


def say(text: str) -> None:
    """Write one line to standard error."""
    click.echo(text.replace("\n", " "), err=True)


def _plain(error: click.ClickException) -> str:
    where = f"dialgen {error.ctx.info_name}" if _has_command(error) else "dialgen"
    message = error.format_message().rstrip(".")
    return f"{where}: {message[:1].lower() + message[1:]}; see {where} --help"


def _has_command(error: click.ClickException) -> bool:
    ctx = getattr(error, "ctx", None)
    return ctx is not None and ctx.parent is not None

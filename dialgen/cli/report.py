"""How the program says that something is wrong: plain lines on standard error, and a status."""

from __future__ import annotations

import os
import re
import sys
from collections.abc import Iterable, Sequence

import click

from dialgen.errors import DialFileError, DialgenError, Fault, Refused

MOST_LINES = 6
WRONG_INPUT = 2
STOPPED = 130

_CONTROL = re.compile("[\x00-\x1f\x7f-\x9f\ud800-\udfff]")
_CLICK_WORDS = {
    "is not a valid float": "is not a number",
    "is not a valid integer": "is not a whole number",
    "is not a valid boolean": "is not yes or no",
}


def guarded(program: click.Command) -> int:
    """Run a click program and return its exit status, with every error as plain lines.

    With DIALGEN_TRACEBACK set in the environment, a fault of the program itself is raised as it is.
    """
    try:
        return _run(program)
    except (BrokenPipeError, SystemExit):
        # The reader of our output (head, say) has seen enough; click leaves by SystemExit.
        _hush()
        return 0
    except OSError as error:
        _hush()
        say(f"cannot write the answer: {(error.strerror or str(error)).lower()}; send it elsewhere")
        return WRONG_INPUT


def _run(program: click.Command) -> int:
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
        return STOPPED
    except OSError:
        raise
    except Exception as error:
        if os.environ.get("DIALGEN_TRACEBACK"):
            raise
        say(
            f"a fault in dialgen itself, {type(error).__name__}: {error}; please report it with the dial file"
        )
        return WRONG_INPUT
    return result if isinstance(result, int) else 0


def say_error(error: DialgenError) -> None:
    """Write an error as one line for each fault: at most six, then how many more."""
    match error:
        case DialFileError():
            say_lines([str(fault) for fault in error.faults])
        case Refused():
            say_lines([str(each) for each in error.errors])
        case _:
            say(str(error))


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
    """Write one line to standard error; whatever a file name may hold, it stays one."""
    click.echo(_CONTROL.sub("?", text.replace("\n", " ")), err=True)


def _plain(error: click.ClickException) -> str:
    ctx = getattr(error, "ctx", None)
    where = f"dialgen {ctx.info_name}" if ctx is not None and ctx.parent is not None else "dialgen"
    message = error.format_message().rstrip(".?")
    for words, ours in _CLICK_WORDS.items():
        message = message.replace(words, ours)
    return f"{where}: {message[:1].lower() + message[1:]}; see {where} --help"


def _hush() -> None:
    """Send what is still waiting for standard output nowhere, so that Python's own end is quiet."""
    if sys.__stdout__ is not None:
        nowhere = os.open(os.devnull, os.O_WRONLY)
        os.dup2(nowhere, sys.__stdout__.fileno())
        os.close(nowhere)

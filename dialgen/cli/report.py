"""How the program speaks: its answer, plain lines on standard error for the rest, and a status."""

from __future__ import annotations

import contextlib
import io
import os
import re
import sys
import threading
from collections.abc import Iterable, Iterator, Sequence
from typing import TextIO

import click

from dialgen.errors import DialFileError, DialgenError, Fault, Refused

MOST_LINES = 6
WRONG_INPUT = 2
FAULT = 70
"""A fault of the program itself: EX_SOFTWARE of BSD's sysexits."""
STOPPED = 130
"""Ended by Ctrl-C: what a shell reports for it, 128 and the number of the signal."""

SLOW_S = 1.0

_CONTROL = re.compile("[\x00-\x1f\x7f-\x9f\ud800-\udfff]")
_CLICK_WORDS = {
    "is not a valid float": "is not a number",
    "is not a valid integer": "is not a whole number",
    "is not a valid boolean": "is not yes or no",
}
_SPELT = {"−": "-", "Ω": "ohm", "\u2126": "ohm", "µ": "u", "\u03bc": "u", "∞": "inf", "°": "deg"}


def guarded(program: click.Command) -> int:
    """Run a click program and return its exit status, with every error as plain lines.

    What the program prints is collected and written at the end, so that an answer that cannot be
    written is told from any other error.  With DIALGEN_TRACEBACK set in the environment, a fault of
    the program itself is raised as it is.
    """
    # Text over bytes, as click writes completions for a shell as bytes.
    paper = io.TextIOWrapper(io.BytesIO(), encoding="utf-8", errors="surrogatepass", newline="")
    with contextlib.redirect_stdout(paper):
        status = _run(program)
    paper.seek(0)
    return _write(paper.read()) or status


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
    except SystemExit as end:
        # So click ends where the shell asks for completions.
        return WRONG_INPUT if end.code else 0
    except Exception as error:
        if os.environ.get("DIALGEN_TRACEBACK"):
            raise
        say(
            f"a fault in dialgen itself, {type(error).__name__}: {error}; please report it with the dial "
            "file and what DIALGEN_TRACEBACK=1 in the environment shows"
        )
        return FAULT
    return result if isinstance(result, int) else 0


def _write(answer: str) -> int:
    """Write the answer to standard output and return the status of that."""
    if sys.stdout is None or not answer:
        return 0
    try:
        sys.stdout.write(answer)
        sys.stdout.flush()
    except BrokenPipeError:
        # The reader of our output (head, say) has seen enough.
        _hush(sys.__stdout__)
    except OSError as error:
        _hush(sys.__stdout__)
        say(f"cannot write the answer: {(error.strerror or str(error)).lower()}; send it elsewhere")
        return WRONG_INPUT
    except KeyboardInterrupt:
        _hush(sys.__stdout__)
        say("stopped")
        return STOPPED
    return 0


def spell(error: UnicodeError) -> tuple[str, int]:
    """Spell out what a terminal's encoding lacks: −20 kΩ is -20 kohm, and what has no spelling is ?."""
    if not isinstance(error, UnicodeEncodeError):
        raise error
    return "".join(_SPELT.get(sign, "?") for sign in error.object[error.start : error.end]), error.end


@contextlib.contextmanager
def say_if_slow(text: str) -> Iterator[None]:
    """Say what is being done, if it takes longer than a second."""
    timer = threading.Timer(SLOW_S, say, [text])
    timer.daemon = True
    timer.start()
    try:
        yield
    finally:
        timer.cancel()


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
    """Write warnings, marked as such behind their place: at most six, then how many more."""
    say_lines(
        f"{fault.file}:{fault.line}:{fault.column}: warning: {fault.key and fault.key + ': '}{fault.message}"
        for fault in faults
    )


def say_lines(lines: Iterable[str]) -> None:
    """Write lines to standard error, at most six of them."""
    every = list(lines)
    for line in every[:MOST_LINES]:
        say(line)
    if (more := len(every) - MOST_LINES) > 0:
        say(f"and {more} more")


def say(text: str) -> None:
    """Write one line to standard error; whatever a file name may hold, it stays one."""
    try:
        click.echo(_CONTROL.sub("?", text.replace("\n", " ")), file=sys.stderr)
    except OSError:
        # Nobody is left to be told.
        _hush(sys.__stderr__)


def _plain(error: click.ClickException) -> str:
    ctx = getattr(error, "ctx", None)
    where = f"dialgen {ctx.info_name}" if ctx is not None and ctx.parent is not None else "dialgen"
    message = error.format_message().rstrip(".?")
    for words, ours in _CLICK_WORDS.items():
        message = message.replace(words, ours)
    return f"{where}: {message[:1].lower() + message[1:]}; see {where} --help"


def _hush(stream: TextIO | None) -> None:
    """Send what still waits to be written nowhere, so that Python's own end is quiet."""
    if stream is not None:
        nowhere = os.open(os.devnull, os.O_WRONLY)
        os.dup2(nowhere, stream.fileno())
        os.close(nowhere)

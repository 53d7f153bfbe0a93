"""The command line: a thin way in over `dialgen.api`.

Each command lives in a module of its own, imported when the command is run or its help is asked
for, so that ``dialgen --help`` waits for nothing heavy.
"""

from __future__ import annotations

import codecs
import difflib
import gc
import os
import sys
from importlib import import_module

import click

from dialgen import __version__

_COMMANDS = {
    "new": "a commented dial file to start from",
    "draw": "the plate, as SVG, PDF, PNG or DXF",
    "table": "where every mark falls",
    "circuit": "the range circuit: parts, heat, cautions, a schematic",
    "review": "what would be hard to read on the face, and where",
    "symbols": "the dial symbols, as a sheet or a list",
}

_EPILOG = """\b
A first plate:
  dialgen new square-panel meter.toml
  dialgen draw meter.toml -o meter.pdf -o meter.svg

\b
Completion of commands and options, for bash (zsh and fish alike):
  eval "$(_DIALGEN_COMPLETE=bash_source dialgen)"
"""


class Commands(click.Group):
    """Loads a command's module when it is asked for."""

    def list_commands(self, ctx: click.Context) -> list[str]:
        """Return the commands in the order of the work."""
        return list(_COMMANDS)

    def get_command(self, ctx: click.Context, cmd_name: str) -> click.Command | None:
        """Return a command, or None where there is none of that name."""
        if cmd_name not in _COMMANDS:
            return None
        command: click.Command = import_module(f"dialgen.cli.{cmd_name}").command
        return command

    def resolve_command(
        self, ctx: click.Context, args: list[str]
    ) -> tuple[str | None, click.Command | None, list[str]]:
        """Return the command that ``args`` begin with, or refuse with the nearest name."""
        near = difflib.get_close_matches(args[0], _COMMANDS, n=1)
        if near and args[0] not in _COMMANDS:
            ctx.fail(f"no such command '{args[0]}', did you mean {near[0]}?")
        return super().resolve_command(ctx, args)

    def format_commands(self, ctx: click.Context, formatter: click.HelpFormatter) -> None:
        """Write the commands with their line each, without importing them."""
        with formatter.section("Commands"):
            formatter.write_dl(list(_COMMANDS.items()))


@click.group(
    cls=Commands,
    context_settings={"help_option_names": ["-h", "--help"], "max_content_width": 100},
    epilog=_EPILOG,
    invoke_without_command=True,
)
@click.version_option(__version__, prog_name="dialgen")
@click.pass_context
def program(ctx: click.Context) -> None:
    """Make true-size, printable scale plates for analogue meters from a plain dial file."""
    if ctx.invoked_subcommand is None:
        click.echo(ctx.get_help())


def main() -> None:
    """Run the program, and exit with its status.

    0 is done, 2 that the input is wrong, 70 a fault of the program itself, 130 that it was stopped;
    1 is kept for commands to come that find an instrument short of what was asked.
    """
    from dialgen.cli.report import guarded, spell

    # A command lives a moment: numpy need not start a pool of threads for matrices we have none of,
    # pydantic not search the machine for plugins, nor the collector walk over what start-up made.
    os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")
    os.environ.setdefault("PYDANTIC_DISABLE_PLUGINS", "1")
    gc.set_threshold(50_000)
    codecs.register_error("dialgen", spell)
    for stream in (sys.stdout, sys.stderr):
        # A value such as −5 kΩ must come out on any terminal, if need be spelt out.
        if hasattr(stream, "reconfigure"):
            stream.reconfigure(errors="dialgen")
    sys.exit(guarded(program))

"""``dialgen new``: a commented dial file to start from."""

from __future__ import annotations

import os.path
from pathlib import Path

import click

_EPILOG = """\b
Examples:
  dialgen new --list
  dialgen new square-panel meter.toml
"""


@click.command("new", epilog=_EPILOG)
@click.argument("template", required=False)
@click.argument("file", required=False, type=click.Path())
@click.option("--list", "listed", is_flag=True, help="List the templates, a line each.")
@click.option("--force", is_flag=True, help="Overwrite FILE if it is there.")
def command(template: str | None, file: str | None, listed: bool, force: bool) -> None:
    """Copy TEMPLATE to FILE: a working dial file with a comment beside every line to fill in."""
    from dialgen import api, templates
    from dialgen.errors import OutputError

    if listed:
        width = max(len(name) for name in templates.names())
        for name in templates.names():
            click.echo(f"{name.ljust(width)}  {templates.summary(name)}")
        return
    if template is None or file is None:
        raise click.UsageError(
            "give a template and a file, or --list to see the templates", click.get_current_context()
        )
    text = templates.text(template)
    if os.path.exists(file) and not force:
        raise OutputError(f"{file}: is there already; give another name, or --force to overwrite it")
    api.write_files([(Path(file), text.encode())])
    click.echo(f"{file}: written; fill it in, then: dialgen draw {file} -o {Path(file).with_suffix('.pdf')}")

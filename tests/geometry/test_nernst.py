"""Glass electrodes: the slope by physical constants from elsewhere, and where it is zero."""

import math
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy import constants

from dialgen import api
from dialgen.errors import DialFileError
from dialgen.geometry.nernst import Nernst
from dialgen.quantity import TEMPERATURE


def volts(law, ph):
    """The signal of an electrode in one solution."""
    return float(law.stage((0.0, 14.0), "pH").forward(np.array([ph]))[0])


def test_slope_at_25_degrees():
    """At 25 °C one pH more is 59.159 mV less: the dial file's contract, to its last figure."""
    assert (volts(Nernst(), 5.0) - volts(Nernst(), 4.0)) * 1e3 == pytest.approx(-59.159, abs=5.1e-4)


@pytest.mark.parametrize("celsius", [0.0, 20.0, 37.0, 60.0, 100.0])
def test_slope_by_codata(celsius):
    """At other temperatures the slope is R·T·ln 10/F with CODATA's R and F, as scipy has them."""
    law = Nernst(temperature=TEMPERATURE.read(f"{celsius} degC"))
    slope_v = (
        constants.R
        * (celsius + constants.zero_Celsius)
        * math.log(10.0)
        / constants.physical_constants["Faraday constant"][0]
    )
    assert volts(law, 8.0) == pytest.approx(-slope_v, rel=1e-9)


@given(st.floats(0.0, 100.0), st.floats(6.0, 8.0))
def test_nothing_at_the_isopotential(celsius, isopotential):
    """Whatever the temperature, the isopotential gives nothing, which is where the pointer rests."""
    law = Nernst(temperature=TEMPERATURE.read(f"{celsius:.3f} degC"), isopotential=isopotential)
    assert abs(volts(law, isopotential)) < 1e-15
    assert law.zero((0.0, 14.0), "pH") == 0.0


@given(st.floats(-2.0, 16.0), st.floats(0.0, 100.0))
def test_volts_go_back_to_ph(ph, celsius):
    """inverse(forward(pH)) is the pH to 1e-12."""
    stage = Nernst(temperature=TEMPERATURE.read(f"{celsius:.3f} degC")).stage((0.0, 14.0), "pH")
    assert float(stage.inverse(stage.forward(np.array([ph])))[0]) == pytest.approx(ph, abs=1e-12)


def dial(tmp_path: Path, law: str):
    """Load a pH meter: centre zero, 1 mA through 414.113 ohm for seven steps of 59.159 mV."""
    path = tmp_path / "ph.toml"
    path.write_text(
        f"""dialgen = 1
[movement]
current = "1 mA"
resistance = "75 ohm"
rest = 0
full = 45
[circuit]
kind = "multiplier"
built = "339.113 ohm"
[plate]
size = [90, 70]
pivot = [45, 14]
[[scale]]
unit = "pH"
from = 0
to = 14
law = {law}
radius = 46
""",
        encoding="utf-8",
    )
    return api.load(path)


def test_a_ph_meter_swings_about_its_isopotential(tmp_path):
    """A pH of 0 drives it to full and 14 as far the other way, by 7 times 59.159 mV over 414.113 mV."""
    face = dial(tmp_path, '"nernst"')
    assert face.angle([0.0, 7.0, 14.0]).tolist() == pytest.approx([45.0, 0.0, -45.0], abs=1e-3)


REFUSED = [
    ('{ kind = "nernst", temperature = 25 }', ".temperature: ", '25 has none; write for example "25 degC"'),
    ('{ kind = "nernst", temperature = "25" }', ".temperature: ", "has no unit; write"),
    ('{ kind = "nernst", temperature = "0 K" }', ".temperature: ", "not above absolute zero; "),
    ('{ kind = "nernst", isopotential = "7" }', ".isopotential: ", "write it bare, without quotes"),
    ('{ kind = "nernst", slope = 59 }', ".slope: ", "not a key here; "),
]


@pytest.mark.parametrize(("law", "key", "piece"), REFUSED)
def test_what_is_no_electrode_is_refused(law, key, piece, tmp_path):
    """Each refusal is one line with its place, what is wrong and what would be right."""
    with pytest.raises(DialFileError) as caught:
        dial(tmp_path, law)
    (line,) = str(caught.value).splitlines()
    assert line.startswith(f"{tmp_path / 'ph.toml'}:17:26: scale[1].law{key}")
    assert piece in line

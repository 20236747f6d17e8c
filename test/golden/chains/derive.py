"""Derives every figure of eight invented chains apart from the program, and writes worksheets and figures beside this script.

The program carries noise in temperatures and intercepts as sums of reciprocals at the chain's input. Here the same figures are
come by another way: powers in watts are sent through the stages one after another. Noise is amplified and added to; of two equal
tones each stage makes products of its own, which go on through the stages behind it and add there, in phase or as powers; what
a chain's intercept is, is then read from what comes out.

Holds: nothing here comes from the program under test. All stages are invented.

    python3 derive.py            writes <chain>.budget.json and expected.json
    python3 derive.py --check    says whether the files are what the derivation gives
"""

import json
import re
import sys
import uuid
from math import log10, sqrt
from pathlib import Path

HERE = Path(__file__).parent

BOLTZMANN = 1.380649e-23  # J/K, SI Brochure, 9th edition 2019, exact
REFERENCE_TEMPERATURE = 290.0  # K, ITU-R V.573-5


def decibels(ratio):
    return 10 * log10(ratio)


def ratio_of(figure):
    return 10 ** (figure / 10)


def dbm(watts):
    return decibels(watts) + 30


def watts_of(figure):
    return 10 ** ((figure - 30) / 10)


# What a stage says: gain, nf, oip3, iip3, oip2, iip2, op1db, ip1db (dB and dBm), temperature (K), bandwidth (Hz), selectivity (dB).
CHAINS = {
    "plain-superhet": {
        "title": "Plain superheterodyne",
        "signal": -92.0,
        "noise": 290.0,
        "bandwidth": 200e3,
        "stages": [
            ("pre", "Preselector", {"gain": -1.4}),
            ("lna", "Amplifier", {"gain": 16.0, "nf": 1.1, "oip3": 24.0, "op1db": 12.5}),
            ("img", "Image filter", {"gain": -2.1, "iip3": 42.0}),
            ("mix", "Mixer", {"gain": -6.8, "nf": 7.1, "iip3": 17.0, "ip1db": 7.0}),
            ("amp", "Amplifier at the intermediate frequency", {"gain": 24.0, "nf": 3.2, "oip3": 31.0, "op1db": 19.0}),
        ],
    },
    "powers-superhet": {
        "title": "The same stages with second-order intercepts, products added as powers",
        "signal": -92.0,
        "noise": 290.0,
        "bandwidth": 200e3,
        "intercept": "power",
        "stages": [
            ("pre", "Preselector", {"gain": -1.4}),
            ("lna", "Amplifier", {"gain": 16.0, "nf": 1.1, "oip3": 24.0, "oip2": 41.0, "op1db": 12.5}),
            ("img", "Image filter", {"gain": -2.1, "iip3": 42.0}),
            ("mix", "Mixer", {"gain": -6.8, "nf": 7.1, "iip3": 17.0, "iip2": 43.0, "ip1db": 7.0}),
            ("amp", "Amplifier at the intermediate frequency", {"gain": 24.0, "nf": 3.2, "oip3": 31.0, "oip2": 58.0, "op1db": 19.0}),
        ],
    },
    "bypassed-stages": {
        "title": "First, middle and last stage bypassed",
        "signal": -70.0,
        "bandwidth": 1e6,
        "stages": [
            ("pad", "Switched pad", {"gain": -10.0, "off": True}),
            ("lna", "Amplifier", {"gain": 14.0, "nf": 1.6, "iip3": 4.0, "ip1db": -6.0}),
            ("boost", "Second amplifier", {"gain": 12.0, "nf": 2.4, "oip3": 28.0, "op1db": 17.0, "off": True}),
            ("mix", "Mixer", {"gain": 3.0, "nf": 11.0, "iip3": 9.0, "ip1db": -1.0}),
            ("trim", "Trim", {"gain": -4.0, "off": True}),
        ],
    },
    "hot-line": {
        "title": "A line at 310 K behind a source of 40 K",
        "signal": -108.0,
        "noise": 40.0,
        "bandwidth": 36e6,
        "stages": [
            ("line", "Line on the roof", {"gain": -0.8, "temperature": 310.0}),
            ("lna", "Amplifier", {"gain": 42.0, "nf": 0.6, "oip3": 18.0}),
            ("cable", "Cable", {"gain": -11.0, "temperature": 285.0}),
            ("conv", "Converter", {"gain": 20.0, "nf": 9.5, "oip3": 22.0, "op1db": 11.0}),
        ],
    },
    "cold-line": {
        "title": "A line at 77 K behind a source of 40 K",
        "signal": -118.0,
        "noise": 40.0,
        "bandwidth": 2e6,
        "stages": [
            ("line", "Cooled line", {"gain": -0.8, "temperature": 77.0}),
            ("lna", "Cooled amplifier", {"gain": 33.0, "nf": 0.21}),
            ("cable", "Cable", {"gain": -7.5}),
            ("rest", "Receiver", {"gain": 30.0, "nf": 6.0}),
        ],
    },
    "second-order": {
        "title": "Second-order intercepts, as they are and beside an interferer",
        "signal": -80.0,
        "noise": 290.0,
        "bandwidth": 50e3,
        "interferer": -42.0,
        "stages": [
            ("filt", "Half-octave filter", {"gain": -0.7, "iip2": 110.0}),
            ("lna", "Amplifier", {"gain": 12.0, "nf": 2.0, "oip2": 48.0, "oip3": 33.0, "op1db": 20.0}),
            ("mix", "Direct-conversion mixer", {"gain": 5.0, "nf": 12.0, "iip2": 52.0, "iip3": 14.0, "ip1db": 3.0}),
            ("base", "Baseband amplifier", {"gain": 25.0, "nf": 15.0, "iip2": 60.0, "oip3": 38.0}),
        ],
    },
    "selective": {
        "title": "Selectivity beside a strong interferer",
        "signal": -97.0,
        "noise": 350.0,
        "bandwidth": 30e3,
        "interferer": -28.0,
        "stages": [
            ("pre", "Preselector", {"gain": -1.9, "iip3": 55.0, "selectivity": 4.0}),
            ("lna", "Amplifier", {"gain": 11.0, "nf": 1.9, "oip3": 27.0, "op1db": 15.0}),
            ("mix", "Mixer", {"gain": -7.0, "nf": 7.4, "iip3": 22.0, "ip1db": 11.0}),
            ("xtal", "Crystal filter", {"gain": -3.2, "iip3": 30.0, "selectivity": 55.0, "bandwidth": 16e3}),
            ("amp", "Amplifier behind the filter", {"gain": 45.0, "nf": 4.5, "oip3": 20.0, "op1db": 9.0}),
        ],
    },
    "narrowing": {
        "title": "Noise bandwidths that narrow, products added as powers",
        "signal": -101.0,
        "noise": 180.0,
        "bandwidth": 5e6,
        "interferer": -36.0,
        "intercept": "power",
        "stages": [
            ("lna", "Amplifier", {"gain": 18.0, "nf": 0.9, "iip3": 1.0, "oip2": 44.0, "op1db": 8.0}),
            ("roof", "Roofing filter", {"gain": -4.5, "iip3": 38.0, "bandwidth": 120e3, "selectivity": 25.0}),
            ("wide", "Wide filter", {"gain": -1.0, "bandwidth": 900e3}),
            ("amp", "Amplifier", {"gain": 30.0, "nf": 3.8, "oip3": 26.0, "ip1db": -16.0}),
            ("last", "Last filter", {"gain": -2.0, "bandwidth": 12.5e3, "selectivity": 40.0, "iip3": 33.0}),
        ],
    },
}

# What a chain takes its surroundings from.
INPUTS = {"signal": "dBm", "noise": "K", "bandwidth": "Hz", "interferer": "dBm"}


def own_figures(stage):
    """What a stage is by itself, at both ends."""
    own = {"gain": stage["gain"]}
    if "nf" in stage:
        own["nf"] = stage["nf"]
        own["te"] = REFERENCE_TEMPERATURE * (ratio_of(stage["nf"]) - 1)
    else:
        # A passive stage gives off at its output what it takes in: T·(1 − 1/L), which is (L − 1)·T at its input.
        loss = ratio_of(-stage["gain"])
        own["te"] = stage.get("temperature", REFERENCE_TEMPERATURE) * (1 - 1 / loss) * loss
        own["nf"] = decibels(1 + own["te"] / REFERENCE_TEMPERATURE)
    for at_input, at_output, step in (("iip3", "oip3", 0), ("iip2", "oip2", 0), ("ip1db", "op1db", 1)):
        if at_input in stage:
            own[at_input] = stage[at_input]
            own[at_output] = stage[at_input] + stage["gain"] - step
        elif at_output in stage:
            own[at_output] = stage[at_output]
            own[at_input] = stage[at_output] - stage["gain"] + step
    for name in ("temperature", "bandwidth", "selectivity"):
        if name in stage:
            own[name] = stage[name]
    return own


class Products:
    """Products of two equal tones on their way through the chain, as amplitudes in √W, each stage's apart."""

    def __init__(self, order, tone_watts, in_phase):
        self.order, self.tone, self.in_phase, self.parts = order, tone_watts, in_phase, {}
        self.first_tone = tone_watts
        self.gain = 1.0

    def through(self, symbol, gain_db, input_point_dbm, rejection_db):
        gain = ratio_of(gain_db)
        self.parts = {name: part * sqrt(gain) for name, part in self.parts.items()}
        if input_point_dbm is not None:
            # By the definition of the point: products and tones, drawn on, meet there.
            output_point = watts_of(input_point_dbm) * gain
            out = self.tone * gain
            self.parts[symbol] = sqrt(out**self.order / output_point ** (self.order - 1))
        self.tone *= gain / ratio_of(rejection_db)
        self.gain *= gain

    def power(self):
        if self.in_phase:
            return sum(self.parts.values()) ** 2
        return sum(part**2 for part in self.parts.values())

    def input_point(self):
        """The input level at which tone and products would meet, dBm; None of a chain that makes none."""
        if not self.parts:
            return None
        out = self.first_tone * self.gain
        output_point = (out**self.order / self.power()) ** (1 / (self.order - 1))
        return dbm(output_point / self.gain)

    def share(self, symbol):
        if self.in_phase:
            return 100 * self.parts.get(symbol, 0.0) / sum(self.parts.values())
        return 100 * self.parts.get(symbol, 0.0) ** 2 / self.power()


def derive(chain):
    out = {}
    in_phase = chain.get("intercept", "coherent") == "coherent"
    source = chain.get("noise", REFERENCE_TEMPERATURE)
    bandwidth = chain["bandwidth"]
    signal = watts_of(chain["signal"])
    interferer = watts_of(chain["interferer"]) if "interferer" in chain else None

    out.update({f"input.{name}": chain[name] for name in INPUTS if name in chain})
    out["in.signal"] = dbm(signal)
    out["in.noise"] = dbm(BOLTZMANN * source * bandwidth)
    out["in.snr"] = decibels(signal / (BOLTZMANN * source * bandwidth))

    test_tone = 1e-9  # W; how strong it is does not matter
    third = Products(3, test_tone, in_phase)
    second = Products(2, test_tone, in_phase)
    # One decibel of compression is combined as third-order products are.
    squeeze = Products(3, test_tone, in_phase)
    tones = Products(3, interferer if interferer is not None else signal, in_phase)
    twins = Products(2, interferer if interferer is not None else signal, in_phase)

    gain = 1.0
    density = BOLTZMANN * source  # W/Hz, behind the stages so far
    rejection = 1.0
    lost_voltage = None
    for symbol, _, stage in chain["stages"]:
        own = own_figures(stage)
        for name, figure in own.items():
            out[f"{symbol}.{name}"] = figure
        if not stage.get("off", False):
            entering = [signal * gain] + ([] if interferer is None else [interferer * gain / rejection])
            if "ip1db" in own:
                out[f"{symbol}.headroom"] = own["ip1db"] - dbm(sum(entering))
            if interferer is not None and "iip3" in own:
                # The cubic term takes 2·P/IIP3 off the voltage gain of a weak signal beside a strong one.
                lost_voltage = (lost_voltage or 0.0) + 2 * entering[1] / watts_of(own["iip3"])
            factor = ratio_of(own["gain"])
            density = (density + BOLTZMANN * own["te"]) * factor
            gain *= factor
            third.through(symbol, own["gain"], own.get("iip3"), 0)
            second.through(symbol, own["gain"], own.get("iip2"), 0)
            squeeze.through(symbol, own["gain"], own.get("ip1db"), 0)
            tones.through(symbol, own["gain"], own.get("iip3"), own.get("selectivity", 0))
            twins.through(symbol, own["gain"], own.get("iip2"), own.get("selectivity", 0))
            rejection *= ratio_of(own.get("selectivity", 0))
            bandwidth = min(bandwidth, own.get("bandwidth", bandwidth))
        added = density / gain / BOLTZMANN - source
        out[f"{symbol}.out.gain"] = decibels(gain)
        out[f"{symbol}.out.te"] = added
        out[f"{symbol}.out.nf"] = decibels(1 + added / REFERENCE_TEMPERATURE)
        out[f"{symbol}.out.signal"] = dbm(signal * gain)
        out[f"{symbol}.out.noise"] = dbm(density * bandwidth)
        out[f"{symbol}.out.snr"] = decibels(signal * gain / (density * bandwidth))
        if third.input_point() is not None:
            out[f"{symbol}.out.iip3"] = third.input_point()
        if squeeze.input_point() is not None:
            out[f"{symbol}.out.ip1db"] = squeeze.input_point()
        if interferer is not None:
            out[f"{symbol}.out.interferer"] = dbm(interferer * gain / rejection)

    system = density / gain / BOLTZMANN
    out["gain"] = decibels(gain)
    out["te"] = system - source
    out["nf"] = decibels(1 + (system - source) / REFERENCE_TEMPERATURE)
    out["tsys"] = system
    out["signal"] = dbm(signal * gain)
    out["noise"] = dbm(density * bandwidth)
    out["snr"] = decibels(signal * gain / (density * bandwidth))
    floor = dbm(density / gain * bandwidth)
    out["mds"] = floor
    point = third.input_point()
    if point is not None:
        out["iip3"] = point
        out["oip3"] = point + decibels(gain)
        # The tones whose products, referred to the input, are as strong as the noise: 3·P − 2·IIP3 = floor.
        strongest = (floor + 2 * point) / 3
        out["sfdr"] = strongest - floor
        out["im3"] = dbm(tones.power())
    if second.input_point() is not None:
        out["iip2"] = second.input_point()
        out["oip2"] = second.input_point() + decibels(gain)
        out["im2"] = dbm(twins.power())
    if squeeze.input_point() is not None:
        out["ip1db"] = squeeze.input_point()
        out["op1db"] = squeeze.input_point() + decibels(gain) - 1
    if interferer is not None and point is not None:
        out["rise"] = decibels((density * bandwidth + tones.power()) / (density * bandwidth))
        out["blocking"] = -20 * log10(1 - lost_voltage)

    # Shares: of the noise at the output what each stage has put in, and of the products likewise.
    total = density
    behind = 1.0
    for symbol, _, stage in reversed(chain["stages"]):
        if stage.get("off", False):
            continue
        own = own_figures(stage)
        behind *= ratio_of(own["gain"])
        out[f"{symbol}.noise_share"] = 100 * BOLTZMANN * own["te"] * behind / total
        if "iip3" in own:
            out[f"{symbol}.distortion_share"] = third.share(symbol)
    out["source_share"] = 100 * BOLTZMANN * source * behind / total
    return out


FIELDS = {
    "gain": ("gain", "dB"),
    "nf": ("noiseFigure", "dB"),
    "oip3": ("outputIntercept", "dBm"),
    "iip3": ("inputIntercept", "dBm"),
    "oip2": ("outputIntercept2", "dBm"),
    "iip2": ("inputIntercept2", "dBm"),
    "op1db": ("outputCompression", "dBm"),
    "ip1db": ("inputCompression", "dBm"),
    "temperature": ("temperature", "K"),
    "bandwidth": ("noiseBandwidth", "Hz"),
    "selectivity": ("selectivity", "dB"),
}

def worksheet_of(name, chain):
    stages = []
    for number, (symbol, label, stage) in enumerate(chain["stages"]):
        written = {"id": f"s{number + 1}", "symbol": symbol, "label": label}
        if stage.get("off", False):
            written["off"] = True
        for key, (field, unit) in FIELDS.items():
            if key in stage:
                written[field] = f"{stage[key]:.12g} {unit}"
        stages.append(written)
    section = {"id": "rx", "kind": "chain", "symbol": "rx", "title": chain["title"]}
    section.update({key: f"{chain[key]:.12g} {unit}" for key, unit in INPUTS.items() if key in chain})
    if "intercept" in chain:
        section["intercept"] = chain["intercept"]
    section["stages"] = stages
    worksheet = {
        "format": "levelwright-worksheet",
        "version": 1,
        "id": str(uuid.uuid5(uuid.NAMESPACE_URL, name)),
        "title": chain["title"],
        "cases": [{"id": "one", "name": "One"}],
        "sections": [section],
    }
    return json.dumps(worksheet, indent=2, ensure_ascii=False) + "\n"


def main():
    files = {f"{name}.budget.json": worksheet_of(name, chain) for name, chain in CHAINS.items()}
    expected = {name: dict(sorted(derive(chain).items())) for name, chain in CHAINS.items()}
    # Exponents without leading zeros, as the formatter of the repository has them.
    text = re.sub(r"e-0(\d)", r"e-\1", json.dumps(expected, indent=2, ensure_ascii=False))
    files["expected.json"] = text + "\n"
    stale = []
    for file, text in files.items():
        path = HERE / file
        if sys.argv[1:] != ["--check"]:
            path.write_text(text, encoding="utf-8")
        elif not path.exists() or path.read_text(encoding="utf-8") != text:
            stale.append(file)
    if stale:
        sys.exit(f"not what the derivation gives: {', '.join(stale)}")


if __name__ == "__main__":
    main()

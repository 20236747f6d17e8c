"""Derives every figure of the starter worksheets by hand, line by line, and writes the golden files beside this script.

Holds: nothing here comes from the program under test. The inputs are invented, the formulas are written out below from
their definitions, and each line's arithmetic is put down in notes.md as it was done.

    python3 derive.py            writes <starter>/notes.md and <starter>/expected.json
    python3 derive.py --check    says whether the files are what the derivation gives
"""

import json
import re
import sys
from math import asin, cos, inf, isinf, log, log1p, log10, pi, radians, sin, sqrt
from pathlib import Path

HERE = Path(__file__).parent

BOLTZMANN = 1.380649e-23  # J/K, SI Brochure, 9th edition 2019, exact
SPEED_OF_LIGHT = 299792458.0  # m/s, SI Brochure, 9th edition 2019, exact
REFERENCE_TEMPERATURE = 290.0  # K, ITU-R V.573-5
DIPOLE_GAIN = 2.15  # dBi, the trade's rounded gain of a half-wave dipole
ZERO_CELSIUS = 273.15  # K
NO_POWER = "no power"
ENTERED = "as entered"

SUPERSCRIPTS = str.maketrans("-0123456789", "⁻⁰¹²³⁴⁵⁶⁷⁸⁹")


def decibels(ratio):
    return 10 * log10(ratio)


def ratio_of(figure):
    """The linear value behind a figure in decibels; no power is nothing at all."""
    return 0.0 if isinf(figure) else 10 ** (figure / 10)


def w(number):
    """A computed number as it is written in the notes: four decimals, or six and a power of ten."""
    if isinf(number):
        return NO_POWER
    if number == 0:
        return "0"
    if 1e-2 <= abs(number) < 1e9:
        return f"{number:.4f}".replace("-", "−")
    mantissa, exponent = f"{number:.6e}".split("e")
    return f"{mantissa}·10{str(int(exponent)).translate(SUPERSCRIPTS)}".replace("-", "−", 1)


def e(number):
    """An entered number, as it was entered."""
    return NO_POWER if isinf(number) else f"{number:.12g}".replace("-", "−")


def b(number):
    """A computed number in brackets where it is negative, to stand behind an operator."""
    return f"({w(number)})" if number < 0 and not isinf(number) else w(number)


class Account:
    """The lines of one case in the order of the worksheet: section, symbol, unit, figure and arithmetic."""

    def __init__(self):
        self.lines = []
        self.requirements = {}
        self.title = ""

    def section(self, title):
        self.title = title

    def line(self, symbol, figure, unit, arithmetic):
        self.lines.append((self.title, symbol, unit, figure, arithmetic))
        return figure

    def given(self, symbol, figure, unit):
        return self.line(symbol, figure, unit, ENTERED)

    def require(self, symbol, bound, limit):
        figure = next(line[3] for line in self.lines if line[1] == symbol)
        margin = figure - limit if bound == "at least" else limit - figure
        self.requirements[symbol] = (bound, limit, margin)


def metres(distance):
    """A distance: whole metres as entered, others to four decimals."""
    return e(distance) if distance == round(distance) else w(distance)


def free_space(distance_m, frequency_hz):
    ratio = 4 * pi * distance_m * frequency_hz / SPEED_OF_LIGHT
    text = f"20·log10(4π · {metres(distance_m)} m · {e(frequency_hz)} Hz / 299792458 m/s) = 20·log10({w(ratio)})"
    return 20 * log10(ratio), text


def thermal(temperature, bandwidth):
    """k·T·B in dBm, and how it was computed."""
    milliwatts = BOLTZMANN * temperature * bandwidth * 1000
    return decibels(milliwatts), f"10·log10(1000 · k · {e(temperature)} K · {e(bandwidth)} Hz) = 10·log10({w(milliwatts)})"


def passive_factor(loss, kelvin):
    """Noise factor of a passive loss at a physical temperature: 1 + (L − 1)·T/290 K."""
    factor = 1 + (ratio_of(loss) - 1) * kelvin / REFERENCE_TEMPERATURE
    return factor, f"F₁ = 1 + ({w(ratio_of(loss))} − 1) · {e(kelvin)}/290 = {w(factor)}"


def power_sum(figures):
    total = sum(ratio_of(figure) for figure in figures)
    return decibels(total), f"10·log10({' + '.join(w(ratio_of(figure)) for figure in figures)}) = 10·log10({w(total)})"


def harbour_buoy_uplink(case):
    storm = case == "storm"
    a = Account()

    a.section("Channel")
    f = a.given("f", 868.3, "MHz")
    bandwidth = a.given("B", 125.0, "kHz")

    a.section("Buoy transmitter")
    p_tx = a.line("P_tx", decibels(25), "dBm", "10·log10(25 mW / 1 mW)")
    a_coax = a.given("a_coax", 0.9, "dB/m")
    l_coax = a.given("l_coax", 2.0, "m")
    l_feed = a.line("L_feed", a_coax * l_coax + 0.2, "dB", f"0.9 dB/m · 2 m + 0.2 dB = {w(a_coax * l_coax)} + 0.2")
    g_tx = a.line("G_tx", -0.5 + DIPOLE_GAIN, "dBi", "−0.5 dBd + 2.15 dB")
    eirp = a.line("EIRP", p_tx - l_feed + g_tx, "dBm", f"{w(p_tx)} − {w(l_feed)} + {w(g_tx)}")
    a.require("EIRP", "at most", 14.0)

    a.section("Path over the harbour")
    d = a.given("d", 3.2, "km")
    l_fs, text = free_space(d * 1e3, f * 1e6)
    a.line("L_fs", l_fs, "dB", text)
    l_quay = a.given("L_quay", 7.0, "dB")
    l_wave = a.given("L_wave", 7.0 if storm else 1.0, "dB")

    a.section("Gateway receiver")
    g_rx = a.given("G_rx", 6.0, "dBi")
    l_rx = a.given("L_rx", 1.5, "dB")
    t_rx = a.given("T_rx", 8.0 if storm else 15.0, "°C")
    nf_rx = a.given("NF_rx", 4.5, "dB")
    cable, text = passive_factor(l_rx, t_rx + ZERO_CELSIUS)
    factor = cable + (ratio_of(nf_rx) - 1) * ratio_of(l_rx)
    nf = a.line(
        "NF",
        decibels(factor),
        "dB",
        f"{text}; F = F₁ + (F₂ − 1)·L = {w(cable)} + ({w(ratio_of(nf_rx))} − 1) · {w(ratio_of(l_rx))} = {w(factor)}; "
        f"10·log10({w(factor)})",
    )

    a.section("Noise and interference at the antenna port")
    ktb, text = thermal(REFERENCE_TEMPERATURE, bandwidth * 1e3)
    n = a.line("N", ktb + nf, "dBm", f"{text} = {w(ktb)}; {w(ktb)} + {w(nf)}")
    eirp_ferry = a.given("EIRP_ferry", 10.0, "dBm")
    d_ferry = a.given("d_ferry", 5.5 if storm else 7.5, "km")
    l_wall = a.given("L_wall", 18.0, "dB")
    ferry_fs, text = free_space(d_ferry * 1e3, f * 1e6)
    i_ferry = a.line(
        "I_ferry",
        eirp_ferry - ferry_fs - l_wall + g_rx,
        "dBm",
        f"{text} = {w(ferry_fs)}; {w(eirp_ferry)} − {w(ferry_fs)} − {w(l_wall)} + {w(g_rx)}",
    )
    p_crane = a.given("P_crane", -inf if storm else -58.0, "dBm")
    acs = a.given("ACS", 52.0, "dB")
    i_crane = a.line(
        "I_crane", p_crane - acs, "dBm", "nothing less 52 dB is nothing" if storm else f"{w(p_crane)} − {w(acs)}"
    )
    i_pump = a.given("I_pump", -112.5 if storm else -inf, "dBm")
    n_tot, text = power_sum([n, i_ferry, i_crane, i_pump])
    a.line("N_tot", n_tot, "dBm", f"in mW: {text}")

    a.section("Received signal and margin")
    c = a.line(
        "C",
        eirp - l_fs - l_quay - l_wave + g_rx,
        "dBm",
        f"{w(eirp)} − {w(l_fs)} − {w(l_quay)} − {w(l_wave)} + {w(g_rx)}",
    )
    sinr = a.line("SINR", c - n_tot, "dB", f"{w(c)} − {b(n_tot)}")
    sinr_req = a.given("SINR_req", 7.5, "dB")
    a.line("M", sinr - sinr_req, "dB", f"{w(sinr)} − {w(sinr_req)}")
    a.require("M", "at least", 3.0)
    return a


def ridge_to_ridge_hop(case):
    rain = case == "rain"
    a = Account()

    a.section("Hop")
    f = a.given("f", 18.4, "GHz")
    d = a.given("d", 9.6, "km")
    bandwidth = a.given("B", 28.0, "MHz")

    a.section("Transmitter on Varnholt Ridge")
    p_tx = a.given("P_tx", -9.0, "dBW")
    a_wg = a.given("a_wg", 0.16, "dB/m")
    l_wg = a.given("l_wg", 4.0, "m")
    l_tx = a.line("L_tx", a_wg * l_wg + 1.1, "dB", f"0.16 dB/m · 4 m + 1.1 dB = {w(a_wg * l_wg)} + 1.1")
    g_tx = a.given("G_tx", 38.4, "dBi")
    eirp = a.line("EIRP", p_tx - l_tx + g_tx, "dBW", f"{w(p_tx)} − {w(l_tx)} + {w(g_tx)}")
    a.require("EIRP", "at most", 30.0)

    a.section("Path")
    l_fs, text = free_space(d * 1e3, f * 1e9)
    a.line("L_fs", l_fs, "dB", text)
    l_gas = a.line("L_gas", 0.07 * d, "dB", "0.07 dB/km · 9.6 km")
    gamma = a.given("γ_R", 3.3 if rain else 0.0, "dB/km")
    r = a.given("r", 0.62, "1")
    l_rain = a.line("L_rain", gamma * r * d, "dB", f"{w(gamma)} dB/km · 0.62 · 9.6 km = {w(gamma)} · {w(r * d)}")
    l_wet = a.given("L_wet", 1.6 if rain else 0.0, "dB")

    a.section("Receiver on Ollin Scar")
    g_rx = a.given("G_rx", 38.4, "dBi")
    c = a.line(
        "C",
        eirp + 30 - l_fs - l_gas - l_rain - l_wet + g_rx,
        "dBm",
        f"{w(eirp)} dBW is {w(eirp + 30)} dBm; "
        f"{w(eirp + 30)} − {w(l_fs)} − {w(l_gas)} − {w(l_rain)} − {w(l_wet)} + {w(g_rx)}",
    )
    l_rx = a.given("L_rx", 1.9, "dB")
    a.line("P_in", c - l_rx, "dBm", f"{w(c)} − {w(l_rx)}")
    a.require("P_in", "at most", -25.0)
    nf_rx = a.given("NF_rx", 5.5, "dB")
    nf = a.line("NF", nf_rx + l_rx, "dB", f"{w(nf_rx)} + {w(l_rx)}")
    ktb, text = thermal(REFERENCE_TEMPERATURE, bandwidth * 1e6)
    n = a.line("N", ktb + nf, "dBm", f"{text} = {w(ktb)}; {w(ktb)} + {w(nf)}")
    i = a.given("I", -94.0, "dBm")

    a.section("Carrier to noise, interference and distortion")
    cn = a.line("CN", c - n, "dB", f"{w(c)} − {b(n)}")
    ci = a.line("CI", c - i, "dB", f"{w(c)} − {b(i)}")
    cd = a.given("CD", 36.0, "dB")
    reciprocals = [ratio_of(-ratio) for ratio in (cn, ci, cd)]
    cn_tot = a.line(
        "CN_tot",
        -decibels(sum(reciprocals)),
        "dB",
        f"−10·log10({' + '.join(w(one) for one in reciprocals)}) = −10·log10({w(sum(reciprocals))})",
    )
    cn_req = a.given("CN_req", 24.5, "dB")
    a.line("M", cn_tot - cn_req, "dB", f"{w(cn_tot)} − {w(cn_req)}")
    a.require("M", "at least", 1.0)

    a.section("Fade margin")
    allowed, distortion = ratio_of(-cn_req), ratio_of(-cd)
    cn_thr = a.line(
        "CN_thr",
        -decibels(allowed - distortion),
        "dB",
        f"−10·log10({w(allowed)} − {w(distortion)}) = −10·log10({w(allowed - distortion)})",
    )
    both, text = power_sum([n, i])
    c_thr = a.line("C_thr", both + cn_thr, "dBm", f"in mW: {text} = {w(both)}; {w(both)} + {w(cn_thr)}")
    a.line("FM", c - c_thr, "dB", f"{w(c)} − {b(c_thr)}")
    a.require("FM", "at least", 1.0)
    return a


def small_satellite_downlink(case):
    low = case == "low"
    a = Account()

    a.section("Pass geometry")
    h = a.given("h", 560.0, "km")
    r_e = a.given("R_E", 6371.0, "km")
    el = a.given("el", 10.0 if low else 90.0, "deg")
    up = r_e * sin(radians(el))
    d = a.line(
        "d",
        sqrt(up * up + 2 * r_e * h + h * h) - up,
        "km",
        f"R_E·sin({el:.0f}°) = {w(up)} km; √({w(up)}² + 2 · 6371 · 560 + 560²) − {w(up)} "
        f"= {w(sqrt(up * up + 2 * r_e * h + h * h))} − {w(up)}",
    )
    # The same range by another way: the law of cosines with the angle at the centre of the Earth.
    nadir = r_e * cos(radians(el)) / (r_e + h)
    centre = pi / 2 - radians(el) - asin(nadir)
    other = sqrt(r_e**2 + (r_e + h) ** 2 - 2 * r_e * (r_e + h) * cos(centre))
    assert abs(d - other) < 1e-6, "the two ways to the slant range differ"
    f = a.given("f", 2.245, "GHz")

    a.section("Satellite transmitter")
    p_tx = a.line("P_tx", decibels(1.2), "dBW", "10·log10(1.2 W / 1 W)")
    l_tx = a.given("L_tx", 0.9, "dB")
    g_tx = a.given("G_tx", 1.1 if low else 5.9, "dBi")
    eirp = a.line("EIRP", p_tx - l_tx + g_tx, "dBW", f"{w(p_tx)} − {w(l_tx)} + {w(g_tx)}")
    bandwidth = a.given("B", 4.8, "MHz")
    spreading = decibels(4 * pi * (d * 1e3) ** 2)
    width = decibels(bandwidth * 1e6)
    a.line(
        "PFD",
        eirp - spreading - width + decibels(4000),
        "dBW/m²/4kHz",
        f"10·log10(4π · {metres(d * 1e3)}²) = {w(spreading)} dB over 1 m²; 10·log10(4800000) = {w(width)} dBHz; "
        f"{w(eirp)} − {w(spreading)} − {w(width)} = {w(eirp - spreading - width)} dBW/m²/Hz; "
        f"plus 10·log10(4000) = {w(decibels(4000))}",
    )
    a.require("PFD", "at most", -148.0)

    a.section("Path")
    l_fs, text = free_space(d * 1e3, f * 1e9)
    a.line("L_fs", l_fs, "dB", text)
    l_atm = a.given("L_atm", 0.6 if low else 0.1, "dB")
    l_pol = a.given("L_pol", 1.2 if low else 0.5, "dB")

    a.section("Ground station")
    dish = a.given("D", 3.0, "m")
    eta = a.given("eta", 58.0, "%")
    circumference = pi * dish * f * 1e9 / SPEED_OF_LIGHT
    gain = eta / 100 * circumference**2
    g_rx = a.line(
        "G_rx",
        decibels(gain),
        "dBi",
        f"π·D/λ = π · 3 · {e(f * 1e9)} / 299792458 = {w(circumference)}; "
        f"0.58 · {w(circumference)}² = {w(gain)}; 10·log10({w(gain)})",
    )
    t_ant = a.given("T_ant", 75.0 if low else 28.0, "K")
    l_line = a.given("L_line", 0.4, "dB")
    t_line = a.given("T_line", 20.0, "°C")
    nf_lna = a.given("NF_lna", 0.7, "dB")
    g_lna = a.given("G_lna", 28.0, "dB")
    nf_rx = a.given("NF_rx", 9.0, "dB")
    line, text = passive_factor(l_line, t_line + ZERO_CELSIUS)
    second = (ratio_of(nf_lna) - 1) * ratio_of(l_line)
    third = (ratio_of(nf_rx) - 1) * ratio_of(l_line) / ratio_of(g_lna)
    factor = line + second + third
    nf_st = a.line(
        "NF_st",
        decibels(factor),
        "dB",
        f"{text}; (F₂ − 1)·L = ({w(ratio_of(nf_lna))} − 1) · {w(ratio_of(l_line))} = {w(second)}; "
        f"(F₃ − 1)·L/G₂ = ({w(ratio_of(nf_rx))} − 1) · {w(ratio_of(l_line))} / {w(ratio_of(g_lna))} = {w(third)}; "
        f"F = {w(factor)}; 10·log10({w(factor)})",
    )
    t_e = REFERENCE_TEMPERATURE * (ratio_of(nf_st) - 1)
    t_sys = a.line("T_sys", t_ant + t_e, "K", f"290 · ({w(ratio_of(nf_st))} − 1) = {w(t_e)} K; {w(t_ant)} + {w(t_e)}")
    gt = a.line("GT", g_rx - decibels(t_sys), "dB/K", f"{w(g_rx)} − 10·log10({w(t_sys)}) = {w(g_rx)} − {w(decibels(t_sys))}")

    a.section("C/N₀, Eb/N₀ and margin")
    k = decibels(BOLTZMANN)
    cn0 = a.line(
        "CN0",
        eirp - l_fs - l_atm - l_pol + gt - k,
        "dBHz",
        f"10·log10(k) = {w(k)}; {w(eirp)} − {w(l_fs)} − {w(l_atm)} − {w(l_pol)} + {w(gt)} − {b(k)}",
    )
    r_b = a.line("R_b", decibels(4e6), "dB(bit/s)", "10·log10(4000000 bit/s / 1 bit/s)")
    ebn0 = a.line("EbN0", cn0 - r_b, "dB", f"{w(cn0)} − {w(r_b)}")
    ebn0_req = a.given("EbN0_req", 4.4, "dB")
    l_impl = a.given("L_impl", 1.5, "dB")
    a.line("M", ebn0 - l_impl - ebn0_req, "dB", f"{w(ebn0)} − {w(l_impl)} − {w(ebn0_req)}")
    a.require("M", "at least", 3.0)
    return a


def plus(figures):
    """Figures to be added, each with its sign."""
    text = " ".join(f"{'−' if figure < 0 else '+'} {e(abs(figure))}" for figure in figures)
    return text.removeprefix("+ ").replace("− ", "−", 1) if text.startswith("−") else text.removeprefix("+ ")


class Stage:
    """A stage as its data sheet has it, levels brought to its input. What is not said is None."""

    def __init__(self, symbol, gain, nf=None, kelvin=None, iip3=None, oip3=None, ip1=None, op1=None, hertz=None, rejects=0.0):
        self.symbol, self.gain, self.hertz, self.rejects = symbol, gain, hertz, rejects
        physical = REFERENCE_TEMPERATURE if kelvin is None else kelvin
        self.kelvin = (
            (ratio_of(-gain) - 1) * physical if nf is None else REFERENCE_TEMPERATURE * (ratio_of(nf) - 1)
        )
        self.iip3 = iip3 if oip3 is None else oip3 - gain
        # At 1 dB compression the output is 1 dB less than the gain has it.
        self.ip1 = ip1 if op1 is None else op1 - gain + 1


def send_through(a, chain, stages, signal, source, bandwidth, neighbour=None, headroom_of=()):
    """The outputs of a chain: noise by temperatures (Friis), third-order products of the stages in phase (the worst case)."""
    ahead, rejected, gain, rejection = [], [], 0.0, 0.0
    for stage in stages:
        ahead.append(gain)
        rejected.append(rejection)
        gain += stage.gain
        rejection += stage.rejects
    hertz = min([bandwidth] + [stage.hertz for stage in stages if stage.hertz is not None])

    for symbol in headroom_of:
        index = next(i for i, stage in enumerate(stages) if stage.symbol == symbol)
        stage, entering = stages[index], [signal + ahead[index]]
        if neighbour is not None:
            entering.append(neighbour + ahead[index] - rejected[index])
        both, text = power_sum(entering)
        a.line(
            f"{chain}.{symbol}.headroom",
            stage.ip1 - both,
            "dB",
            f"compression at {w(stage.ip1)} dBm at its input; enters, in mW: {text} = {w(both)}; {w(stage.ip1)} − {b(both)}",
        )
    a.line(f"{chain}.gain", gain, "dB", plus([stage.gain for stage in stages]))
    parts = [stage.kelvin / ratio_of(before) for stage, before in zip(stages, ahead)]
    te = a.line(
        f"{chain}.te",
        sum(parts),
        "K",
        " + ".join(f"{w(stage.kelvin)}/{w(ratio_of(before))}" for stage, before in zip(stages, ahead)),
    )
    a.line(f"{chain}.nf", decibels(1 + te / REFERENCE_TEMPERATURE), "dB", f"10·log10(1 + {w(te)}/290)")
    tsys = a.line(f"{chain}.tsys", source + te, "K", f"{w(source)} + {w(te)}")
    a.line(f"{chain}.source_share", 100 * source / tsys, "%", f"100 · {w(source)}/{w(tsys)}")

    def reciprocals(point_of, weight=0.0):
        terms = [
            ratio_of(before - weight * lost - point_of(stage))
            for stage, before, lost in zip(stages, ahead, rejected)
            if point_of(stage) is not None
        ]
        return -decibels(sum(terms)), f"−10·log10({' + '.join(w(term) for term in terms)})"

    iip3, text = reciprocals(lambda stage: stage.iip3)
    a.line(f"{chain}.iip3", iip3, "dBm", f"in 1/mW: {text}")
    a.line(f"{chain}.oip3", iip3 + gain, "dBm", f"{w(iip3)} + {w(gain)}")
    ip1, text = reciprocals(lambda stage: stage.ip1)
    a.line(f"{chain}.ip1db", ip1, "dBm", f"in 1/mW: {text}")
    a.line(f"{chain}.op1db", ip1 + gain - 1, "dBm", f"{w(ip1)} + {w(gain)} − 1")
    mds, text = thermal(tsys, hertz)
    a.line(f"{chain}.mds", mds, "dBm", text)
    a.line(f"{chain}.sfdr", 2 / 3 * (iip3 - mds), "dB", f"2/3 · ({w(iip3)} − {b(mds)})")
    out = a.line(f"{chain}.signal", signal + gain, "dBm", f"{w(signal)} + {w(gain)}")
    noise = a.line(f"{chain}.noise", mds + gain, "dBm", f"{w(mds)} + {w(gain)}")
    a.line(f"{chain}.snr", out - noise, "dB", f"{w(out)} − {b(noise)}")
    tone = signal if neighbour is None else neighbour
    # Three tones make a product, so that what is taken off each of them counts threefold, half of it for each of IIP3's two.
    towards, text = reciprocals(lambda stage: stage.iip3, 1.5)
    im3 = a.line(
        f"{chain}.im3",
        3 * tone - 2 * towards + gain,
        "dBm",
        f"the intercept towards tones that the filters take down, in 1/mW: {text} = {w(towards)}; "
        f"3 · {b(tone)} − 2 · {b(towards)} + {w(gain)}",
    )
    if neighbour is not None:
        ratio = ratio_of(im3 - noise)
        a.line(f"{chain}.rise", 10 * log1p(ratio) / log(10), "dB", f"10·log10(1 + {w(ratio)})")
        point, text = reciprocals(lambda stage: stage.iip3, 1)
        lost = 2 * ratio_of(neighbour - point)
        a.line(
            f"{chain}.blocking",
            -20 * log1p(-lost) / log(10),
            "dB",
            f"the intercept towards one tone, in 1/mW: {text} = {w(point)}; "
            f"2·P/IIP3 = 2 · 10^(({w(neighbour)} − {b(point)})/10) = {w(lost)}; −20·log10(1 − {w(lost)})",
        )
    return {"gain": gain, "signal": out, "noise": noise, "mds": mds, "im3": im3, "tsys": tsys, "rejection": rejection}


def two_conversion_receiver(case):
    loud = case == "neighbour"
    a = Account()

    a.section("At the antenna connector")
    s = a.given("S", -110.0, "dBm")
    t_ant = a.given("T_ant", 350.0, "K")
    bandwidth = a.given("B", 12.5, "kHz")
    p_nb = a.given("P_nb", -35.5 if loud else -75.0, "dBm")
    l_pn = a.given("L_pn", -146.0, "dBc/Hz")

    a.section("Receiver")
    ceramic = 8.4e3
    stages = [
        Stage("pre", -1.6),
        Stage("lna", 18.0, nf=1.9, oip3=38.0, op1=22.0),
        Stage("img", -2.0),
        Stage("mix1", -6.5, nf=6.8, iip3=27.0, ip1=15.0),
        Stage("xtal", -2.5, iip3=34.0, hertz=9.6e3, rejects=45.0),
        Stage("amp", 21.0, nf=1.6, oip3=27.0, op1=14.0),
        Stage("mix2", 6.0, nf=11.0, iip3=8.0, ip1=-3.0),
        Stage("cer", -4.0, hertz=ceramic, rejects=58.0),
        Stage("conv", 0.0, nf=20.0, ip1=4.0),
    ]
    critical = ("lna", "mix1", "amp", "mix2", "conv")
    rx = send_through(a, "rx", stages, s, t_ant, bandwidth * 1e3, p_nb, critical)
    headrooms = {symbol: next(line[3] for line in a.lines if line[1] == f"rx.{symbol}.headroom") for symbol in critical}
    sfdr = next(line[3] for line in a.lines if line[1] == "rx.sfdr")
    blocking = next(line[3] for line in a.lines if line[1] == "rx.blocking")

    a.section("Noise and interference at the converter")
    n_rx = a.line("N_rx", rx["noise"], "dBm", "the chain's")
    d_3 = a.line("D_3", rx["im3"], "dBm", "the chain's")
    width = decibels(ceramic)
    n_rm = a.line(
        "N_rm",
        p_nb + l_pn + width + rx["gain"],
        "dBm",
        f"10·log10(8400) = {w(width)} dBHz; {w(p_nb)} − 146 + {w(width)} + {w(rx['gain'])}",
    )
    i_res = a.line(
        "I_res",
        p_nb + rx["gain"] - rx["rejection"],
        "dBm",
        f"{w(p_nb)} + {w(rx['gain'])} − 45 − 58",
    )
    spur = -132.0 if loud else -134.0
    i_spur = a.line("I_spur", spur + rx["gain"], "dBm", f"{e(spur)} + {w(rx['gain'])}")
    n_i, text = power_sum([n_rx, d_3, n_rm, i_res, i_spur])
    a.line("N_I", n_i, "dBm", f"in mW: {text}")

    a.section("Signal, noise and headroom")
    sinr = a.line("SINR", rx["signal"] - n_i, "dB", f"{w(rx['signal'])} − {b(n_i)}")
    sinr_req = a.given("SINR_req", 12.0, "dB")
    a.line("M", sinr - sinr_req, "dB", f"{w(sinr)} − {w(sinr_req)}")
    a.require("M", "at least", 3.0)
    a.line("S_min", rx["mds"] + sinr_req, "dBm", f"{w(rx['mds'])} + {w(sinr_req)}")
    a.line("H", min(headrooms.values()), "dB", f"the least of {', '.join(w(one) for one in headrooms.values())}")
    a.require("H", "at least", 20.0)
    a.line("R_sf", sfdr, "dB", "the chain's")
    a.require("R_sf", "at least", 70.0)
    a.line("L_des", blocking, "dB", "the chain's")
    a.require("L_des", "at most", 1.0)
    return a


def satellite_ground_station(case):
    rain = case == "rain"
    a = Account()

    a.section("Satellite and path")
    f = a.given("f", 8.16, "GHz")
    eirp = a.given("EIRP", 15.4 if rain else 12.5, "dBW")
    el = a.given("el", 14.0 if rain else 58.0, "deg")
    h = a.given("h", 615.0, "km")
    r_e = a.given("R_E", 6371.0, "km")
    up = r_e * sin(radians(el))
    d = a.line(
        "d",
        sqrt(up * up + 2 * r_e * h + h * h) - up,
        "km",
        f"R_E·sin({el:.0f}°) = {w(up)} km; √({w(up)}² + 2 · 6371 · 615 + 615²) − {w(up)}",
    )
    l_fs, text = free_space(d * 1e3, f * 1e9)
    a.line("L_fs", l_fs, "dB", text)
    l_gas = a.given("L_gas", 0.3 if rain else 0.1, "dB")
    l_rain = a.given("L_rain", 2.4 if rain else 0.0, "dB")
    l_pol = a.given("L_pol", 0.6 if rain else 0.3, "dB")

    a.section("At the antenna flange")
    g_ant = a.given("G_ant", 47.6, "dBi")
    t_med = a.given("T_med", 275.0, "K")
    # Straight lines between the points of the curve that the elevation lies between.
    (x0, y0), (x1, y1) = ((10.0, 61.0), (20.0, 44.0)) if rain else ((30.0, 37.0), (60.0, 31.0))
    clear = y0 + (y1 - y0) * (el - x0) / (x1 - x0)
    through = ratio_of(-l_rain)
    t_ant = a.line(
        "T_ant",
        clear * through + t_med * (1 - through),
        "K",
        f"clear air: {e(y0)} + ({e(y1)} − {e(y0)}) · ({e(el)} − {e(x0)})/({e(x1)} − {e(x0)}) = {w(clear)} K; "
        f"{w(clear)} · {w(through)} + 275 · (1 − {w(through)})",
    )
    c = a.line(
        "C",
        eirp + 30 - l_fs - l_gas - l_rain - l_pol + g_ant,
        "dBm",
        f"{w(eirp)} dBW is {w(eirp + 30)} dBm; "
        f"{w(eirp + 30)} − {w(l_fs)} − {w(l_gas)} − {w(l_rain)} − {w(l_pol)} + {w(g_ant)}",
    )
    bandwidth = a.given("B", 64.0, "MHz")
    t_out = a.given("T_out", 8.0 if rain else 14.0, "°C")
    l_cable = a.given("L_cable", 9.6, "dB")

    a.section("Receiver")
    outside = t_out + ZERO_CELSIUS
    stages = [
        Stage("feed", -0.35, kelvin=outside),
        Stage("lna", 46.0, nf=decibels(1 + 52 / REFERENCE_TEMPERATURE), oip3=22.0, op1=11.0),
        Stage("cable", -l_cable, kelvin=outside),
        Stage("conv", 28.0, nf=11.0, oip3=20.0, op1=9.0),
        Stage("dem", 0.0, nf=17.0, ip1=0.0),
    ]
    gs = send_through(a, "gs", stages, c, t_ant, bandwidth * 1e6, headroom_of=("lna", "conv", "dem"))

    a.section("G/T, C/N₀ and margin")
    gt = a.line(
        "GT",
        g_ant - decibels(gs["tsys"]),
        "dB/K",
        f"{w(g_ant)} − 10·log10({w(gs['tsys'])}) = {w(g_ant)} − {w(decibels(gs['tsys']))}",
    )
    a.require("GT", "at least", 23.5)
    k = decibels(BOLTZMANN)
    cn0 = a.line(
        "CN0",
        eirp - l_fs - l_gas - l_rain - l_pol + gt - k,
        "dBHz",
        f"10·log10(k) = {w(k)}; {w(eirp)} − {w(l_fs)} − {w(l_gas)} − {w(l_rain)} − {w(l_pol)} + {w(gt)} − {b(k)}",
    )
    cn = a.line("CN", gs["signal"] - gs["noise"], "dB", "the chain's")
    # The same by the other way: what the chain makes of it, and the bandwidth.
    assert abs(cn + decibels(bandwidth * 1e6) - cn0) < 1e-9, "C/N and the bandwidth do not make C/N₀"
    r_b = a.line("R_b", decibels(84e6), "dB(bit/s)", "10·log10(84000000 bit/s / 1 bit/s)")
    ebn0 = a.line("EbN0", cn0 - r_b, "dB", f"{w(cn0)} − {w(r_b)}")
    ebn0_req = a.given("EbN0_req", 4.8, "dB")
    l_impl = a.given("L_impl", 1.2, "dB")
    a.line("M", ebn0 - l_impl - ebn0_req, "dB", f"{w(ebn0)} − {w(l_impl)} − {w(ebn0_req)}")
    a.require("M", "at least", 3.0)
    return a


STARTERS = {
    "harbour-buoy-uplink": ("Harbour buoy uplink", harbour_buoy_uplink, {"calm": "Calm", "storm": "Storm"}),
    "ridge-to-ridge-hop": ("Microwave hop between two ridges", ridge_to_ridge_hop, {"clear": "Clear", "rain": "Rain"}),
    "small-satellite-downlink": (
        "Small satellite downlink",
        small_satellite_downlink,
        {"zenith": "Zenith", "low": "Low elevation"},
    ),
    "two-conversion-receiver": (
        "Receiver with two conversions",
        two_conversion_receiver,
        {"quiet": "Quiet band", "neighbour": "Strong neighbour"},
    ),
    "satellite-ground-station": (
        "Satellite ground station",
        satellite_ground_station,
        {"clear": "Clear, high pass", "rain": "Rain, low pass"},
    ),
}

INTRODUCTION = """The place, the parts and every entered figure are invented for the example. The derivation is ours, made line by line
with `derive.py` and not with the program: each formula stands here with its figures. Figures are written to four decimals
and carried on in double precision; `expected.json` holds them in full.

Constants: k = 1.380649·10⁻²³ J/K and c = 299792458 m/s (SI Brochure, 9th edition 2019, both exact), noise figures to
290 K (ITU-R V.573-5), 0 °C = 273.15 K, and 0 dBd = 2.15 dBi, the rounded figure that the trade uses."""


def result(figure, unit, arithmetic):
    """A line's arithmetic and figure."""
    if arithmetic == ENTERED:
        text = e(figure)
    else:
        text = w(figure)
    if not isinf(figure) and unit != "1":
        text += f" {unit}"
    return f"{arithmetic}{', ' if isinf(figure) or arithmetic == ENTERED else ' = '}**{text}**"


def notes_of(title, names, accounts):
    text = [f"# {title}: the derivation", "", INTRODUCTION]
    section = None
    cases = list(accounts)
    for index, (heading, symbol, unit, _, _) in enumerate(accounts[cases[0]].lines):
        if heading != section:
            text += ["", f"## {heading}", ""]
            section = heading
        entries = [(accounts[case].lines[index][3], accounts[case].lines[index][4]) for case in cases]
        if all(entry == entries[0] for entry in entries):
            figure, arithmetic = entries[0]
            text.append(f"- `{symbol}`: {result(figure, unit, arithmetic)}")
        else:
            text.append(f"- `{symbol}`")
            for case, (figure, arithmetic) in zip(cases, entries):
                text.append(f"  - {names[case]}: {result(figure, unit, arithmetic)}")
    text += ["", "## Requirements", ""]
    for symbol, (bound, limit, _) in accounts[cases[0]].requirements.items():
        unit = next(line[2] for line in accounts[cases[0]].lines if line[1] == symbol)
        text.append(f"- `{symbol}`, {bound} {e(limit)} {unit}")
        for case in cases:
            margin = accounts[case].requirements[symbol][2]
            text.append(f"  - {names[case]}: {'met' if margin >= 0 else 'not met'}, margin **{w(margin)} dB**")
    return "\n".join(text) + "\n"


def expected_of(accounts):
    cases = list(accounts)
    lines = {
        symbol: {
            "unit": unit,
            "cases": {
                case: NO_POWER if isinf(accounts[case].lines[index][3]) else accounts[case].lines[index][3] for case in cases
            },
        }
        for index, (_, symbol, unit, _, _) in enumerate(accounts[cases[0]].lines)
    }
    requirements = {
        symbol: {"bound": bound, "limit": limit, "margins": {case: accounts[case].requirements[symbol][2] for case in cases}}
        for symbol, (bound, limit, _) in accounts[cases[0]].requirements.items()
    }
    text = json.dumps({"lines": lines, "requirements": requirements}, indent=2, ensure_ascii=False)
    # Exponents without leading zeros, as the formatter of the repository has them.
    return re.sub(r"e-0(\d)", r"e-\1", text) + "\n"


def main():
    check = sys.argv[1:] == ["--check"]
    stale = []
    for name, (title, derive, names) in STARTERS.items():
        accounts = {case: derive(case) for case in names}
        for file, text in (("notes.md", notes_of(title, names, accounts)), ("expected.json", expected_of(accounts))):
            path = HERE / name / file
            if check:
                if not path.exists() or path.read_text(encoding="utf-8") != text:
                    stale.append(str(path.relative_to(HERE)))
            else:
                path.parent.mkdir(exist_ok=True)
                path.write_text(text, encoding="utf-8")
    if stale:
        sys.exit(f"not what the derivation gives: {', '.join(stale)}")


if __name__ == "__main__":
    main()

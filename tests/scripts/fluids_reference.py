"""Reference numbers for the tests of the fluids, from general-purpose packages.

    python -m venv venv && venv/bin/pip install coolprop==8.0.0 iapws==1.5.5 fluids==1.3.1 thermo==0.6.1
    venv/bin/python tests/scripts/fluids_reference.py

The tests hold a copy of what this prints, with the package and its version beside each number.
"""

import warnings
from importlib.metadata import version

warnings.filterwarnings("ignore")  # iapws warns of the edges of its ranges

import fluids  # noqa: E402
from CoolProp.CoolProp import PropsSI  # noqa: E402
from iapws import D2O, IAPWS95  # noqa: E402
from iapws._iapws import _Liquid, _Viscosity  # noqa: E402
from thermo.electrochem import Laliberte_density, Laliberte_viscosity  # noqa: E402

ZERO_CELSIUS = 273.15
ATMOSPHERE = 101325.0
SODIUM_CHLORIDE, SUCROSE = "7647-14-5", "57-50-1"


def kell(t):
    """Density of water, Kell 1975, kg/m3."""
    top = (999.83952 + 16.945176 * t - 7.9870401e-3 * t**2 - 46.170461e-6 * t**3
           + 105.56302e-9 * t**4 - 280.54253e-12 * t**5)
    return top / (1 + 16.879850e-3 * t)


def supplementary_viscosity(t):
    """Viscosity of water at 0.1 MPa, IAPWS SR6-08(2011), Pa.s."""
    s = (t + ZERO_CELSIUS) / 300
    return 1e-6 * (280.68 * s**-1.9 + 511.45 * s**-7.7 + 61.131 * s**-19.6 + 0.45903 * s**-40)


def title(text):
    print(f"\n# {text}")


def main():
    for package in ("coolprop", "iapws", "fluids", "thermo"):
        print(package, version(package))

    title("water, IAPWS R12-08 check points: T/K, rho, mu/Pa.s (iapws)")
    for temperature, density in ((298.15, 998), (298.15, 1200), (373.15, 1000)):
        print(temperature, density, f"{_Viscosity(density, temperature):.10e}")

    title("water, IAPWS SR6-08 at 0.1 MPa: T/K, mu/Pa.s, rho (iapws)")
    for temperature in (273.16, 298.15, 310.15, 353.15):
        state = _Liquid(temperature, 0.1)
        print(temperature, f"{state['mu']:.8e}", f"{state['rho']:.5f}")

    title("water, IAPWS-95 and R12-08 at 101325 Pa: t/degC, mu/Pa.s, rho (iapws)")
    for t in (0.01, 5, 10, 15, 20, 25, 30, 37, 50, 80, 95):
        state = IAPWS95(T=t + ZERO_CELSIUS, P=ATMOSPHERE / 1e6)
        print(t, f"{state.mu:.6e}", f"{state.rho:.4f}")

    title("water, largest relative deviation from 0.01 to 99 degC: Kell's density, SR6-08's viscosity")
    states = [(t, IAPWS95(T=t + ZERO_CELSIUS, P=ATMOSPHERE / 1e6)) for t in [0.01, *range(1, 100)]]
    print(f"{max(abs(kell(t) / s.rho - 1) for t, s in states):.2e}",
          f"{max(abs(supplementary_viscosity(t) / s.mu - 1) for t, s in states):.2e}")

    title("heavy water at 101325 Pa: t/degC, mu/Pa.s, rho (coolprop), mu/Pa.s (iapws)")
    for t in (20, 22, 25, 30, 37):
        state = ("T", t + ZERO_CELSIUS, "P", ATMOSPHERE, "HeavyWater")
        other = D2O(T=t + ZERO_CELSIUS, P=ATMOSPHERE / 1e6)
        print(t, f"{PropsSI('V', *state):.5e}", f"{PropsSI('D', *state):.3f}", f"{other.mu:.5e}")

    title("dry air at 101325 Pa: t/degC, mu/Pa.s, rho (coolprop), mu/Pa.s (fluids, US Standard Atmosphere 1976)")
    for t in (-40, -20, 0, 20, 40, 70, 100):
        state = ("T", t + ZERO_CELSIUS, "P", ATMOSPHERE, "Air")
        standard = fluids.ATMOSPHERE_1976.viscosity(t + ZERO_CELSIUS)
        print(t, f"{PropsSI('V', *state):.5e}", f"{PropsSI('D', *state):.5f}", f"{standard:.6e}")

    title("glycerol in water: mass fraction, t/degC, rho (coolprop, incompressible MGL)")
    for mass_fraction in (0.1, 0.3, 0.5, 0.6):
        for t in (0, 20, 40):
            name = f"INCOMP::MGL-{100 * mass_fraction:.0f}%"
            print(mass_fraction, t, f"{PropsSI('D', 'T', t + ZERO_CELSIUS, 'P', ATMOSPHERE, name):.2f}")

    title("0.9 % sodium chloride in water: t/degC, mu/Pa.s, rho (thermo, Laliberte 2009), mu/Pa.s, rho (coolprop, MNA)")
    for t in (5, 10, 20, 25, 37):
        state = ("T", t + ZERO_CELSIUS, "P", ATMOSPHERE, "INCOMP::MNA-0.9%")
        other = (t + ZERO_CELSIUS, [0.009], [SODIUM_CHLORIDE])
        print(t, f"{Laliberte_viscosity(*other):.5e}", f"{Laliberte_density(*other):.2f}",
              f"{PropsSI('V', *state):.5e}", f"{PropsSI('D', *state):.2f}")

    title("sucrose in water: mass fraction, t/degC, mu/Pa.s, rho (thermo, Laliberte 2009)")
    for mass_fraction in (0.1, 0.2, 0.4, 0.5):
        for t in (15, 20, 25, 37, 50):
            state = (t + ZERO_CELSIUS, [mass_fraction], [SUCROSE])
            print(mass_fraction, t, f"{Laliberte_viscosity(*state):.4e}", f"{Laliberte_density(*state):.2f}")


if __name__ == "__main__":
    main()

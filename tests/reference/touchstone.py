"""Reads Touchstone files with scikit-rf and prints, for each, frequencies and impedances by every fixture."""
import json
import sys
import warnings

import numpy

warnings.simplefilter('ignore')
numpy.complex = complex  # scikit-rf 0.15 still calls it by the name that newer numpy took away
import skrf  # noqa: E402


def listed(values):
    return [[float(value.real), float(value.imag)] for value in values]


def answer(path):
    network = skrf.Network(path)
    reference = float(network.z0[0, 0].real)
    s11 = network.s[:, 0, 0]
    read = {'f': [float(f) for f in network.f], 'reflection': listed(reference * (1 + s11) / (1 - s11))}
    if network.nports == 1:
        read['reflection'] = listed(network.z[:, 0, 0])
    else:
        s21 = network.s[:, 1, 0]
        read['shunt-through'] = listed(reference / 2 * s21 / (1 - s21))
        read['series-through'] = listed(2 * reference * (1 - s21) / s21)
        chain = network.a
        read['series-chain'] = listed(chain[:, 0, 1])
        # A part in the line has no shunt path, and JSON has no infinity.
        if numpy.abs(chain[:, 1, 0]).min() > 1e-9:
            read['shunt-chain'] = listed(1 / chain[:, 1, 0])
    return read


print(json.dumps([answer(path) for path in sys.argv[1:]]))

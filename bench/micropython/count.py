"""Counts the bytecodes that the emitted control step executes, by CPython's own tracing of opcodes.

Both interpreters are stack machines with one bytecode for each load, store, operation, jump and call. What only CPython has (entering a
function, preparing a call) is left out. Usage: count.py FOLDER; edges and readings of one step a line on the standard input.
"""

import dis
import sys
import types

ONLY_CPYTHON = {"RESUME", "PRECALL", "PUSH_NULL", "NOP", "CACHE", "EXTENDED_ARG", "MAKE_CELL", "COPY_FREE_VARS"}

shim = types.ModuleType("micropython")
shim.const = lambda value: value
sys.modules["micropython"] = shim
sys.path.insert(0, sys.argv[1])

from array import array  # noqa: E402

from steering import Steering  # noqa: E402

names = {}
count = 0


def left_out(code):
    if code not in names:
        names[code] = {each.offset for each in dis.get_instructions(code) if each.opname in ONLY_CPYTHON}
    return names[code]


def trace(frame, event, _argument):
    global count
    frame.f_trace_opcodes = True
    frame.f_trace_lines = False
    if event == "opcode" and frame.f_lasti not in left_out(frame.f_code):
        count += 1
    return trace


def calibration(rounds):
    """A loop of known weight, for the same interpreter's clock."""
    a = 3
    b = 5
    for i in range(rounds):
        c = (a * b) >> 2
        if c > i:
            a = (b - c) & 1023
        else:
            a = (c - b) & 1023
    return a


def counted(call, *arguments):
    global count
    count = 0
    sys.settrace(trace)
    call(*arguments)
    sys.settrace(None)
    return count


steering = Steering()
steering.start()
for line in sys.stdin:
    values = [int(word) for word in line.split()]
    edges, counts = values[:2], array("h", values[2:])
    if hasattr(steering, "count_edges"):
        steering.count_edges(*edges)
    print(counted(steering.step, counts))
print(counted(calibration, 1000) / 1000)

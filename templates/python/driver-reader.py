"""Driver of {{file}} for a trial: reads tasks from the file named by its first argument, answers on standard output."""

import os
import re
import sys
import time

import numpy as np

sys.path.insert(0, os.path.dirname(os.path.abspath(__file__)))

import {{module}} as kernel

HEX = re.compile("[0-9a-fA-F]{16}")


class Tasks:
    """The lines of the task file, with their numbers."""

    def __init__(self, name):
        with open(name, encoding="ascii") as file:
            self.lines = file.read().split("\n")
        self.at = 0

    def fail(self, what):
        sys.exit(f"line {self.at} of the tasks: {what}")

    def next(self):
        if self.at >= len(self.lines) or (self.at == len(self.lines) - 1 and self.lines[self.at] == ""):
            self.at += 1
            self.fail("the file ends before 'end'")
        self.at += 1
        return self.lines[self.at - 1].split()

    def bits(self, text):
        if not HEX.fullmatch(text):
            self.fail("expected the 16 hexadecimal digits of a double")
        return float(np.array([int(text, 16)], dtype=np.uint64).view(np.float64)[0])

    def whole(self, text):
        try:
            return int(text)
        except ValueError:
            return self.fail(f"'{text}' is not an integer")

    def points(self, n):
        """n doubles, one a line."""
        words = []
        for _ in range(n):
            line = self.next()
            if len(line) != 1 or not HEX.fullmatch(line[0]):
                self.fail("expected the 16 hexadecimal digits of a double")
            words.append(int(line[0], 16))
        return np.array(words, dtype=np.uint64).view(np.float64)


def show(u):
    sys.stdout.write("".join(f"{bits:016x}\n" for bits in np.ascontiguousarray(u).view(np.uint64).tolist()))


def triad(n, repeats):
    """Best rate of an own triad a = b + s c on arrays of n doubles, in bytes a second; the store counts twice."""
    a, b, c = np.zeros(n), np.ones(n), np.zeros(n)
    sweeps = 1 + 2_000_000 // n
    best = float("inf")
    for _ in range(repeats):
        begin = time.perf_counter()
        for _ in range(sweeps):
            np.multiply(c, 0.5, out=a)
            np.add(a, b, out=a)
            a, c = c, a
        best = min(best, (time.perf_counter() - begin) / sweeps)
    return 32.0 * n / best



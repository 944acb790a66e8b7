"""Volumes of stents that run oblique to the slices, made without the program: a round tube's spectrum in closed form, passed by
the kernel in the slice and by the slice's thickness across it, in numpy's FFT; noise from white noise of thin layers, filtered
by the ramp and the kernel, the same layers for both kernels.

obliqueStents.py DIR SEED TILT   writes soft.bin, sharp.bin (int16 HU, slice after slice) and truth.json
"""
import json
import sys

import numpy as np
from scipy.ndimage import map_coordinates
from scipy.special import j1

PIXEL = 0.39  # mm
SIZE = 176
LAYER = 0.2  # mm, thin layers of independent noise
THICKNESS = 0.6  # mm, three layers
SPACING = 0.4  # mm, two layers
HALF_Z = 8.2  # mm
SIGMA = 0.22  # mm, shared Gaussian in the slice
CUT = {"soft": 0.65, "sharp": 1.2}  # per mm
NOISE = 55.0  # SD of the sharp kernel, HU
TISSUE, FAT, WALL = 60.0, -90.0, 60.0
CHAMBERS = [(-21, -23, 10), (22, -22, 10), (0, 24, 9)]


def window(side, f):
    f = np.minimum(np.abs(f), CUT[side])
    if side == "soft":
        return (1 + np.cos(np.pi * f / CUT[side])) / 2
    return np.cos(np.pi * f / CUT[side] / 2)


def disc(f, radius, hu):
    """Spectrum of a disc: R J1(2 pi R f) / f (Bracewell, The Fourier Transform and Its Applications)."""
    return hu * np.where(f > 0, radius * j1(2 * np.pi * radius * np.maximum(f, 1e-9)) / np.maximum(f, 1e-9), np.pi * radius**2)


def tube(f, stent):
    inner = stent["innerDiameterMm"] / 2
    outer = inner + stent["strutMm"]
    strut = stent["massHuMm"] / stent["strutMm"]
    return (
        disc(f, 8.5, FAT - TISSUE)
        + disc(f, outer + stent["wallMm"], WALL - FAT)
        + disc(f, outer, strut)
        + disc(f, inner, stent["lumenHu"] - WALL - strut)
    )


def seen_tube(side, stent, tilt):
    """The tube in the plane at right angles to it, as the kernel and the thickness leave it; axes: in both planes, leaning."""
    n, step = 1024, 0.03
    f = np.fft.fftfreq(n, step)
    f1, f2 = np.meshgrid(f, f, indexing="ij")
    in_slice = np.hypot(f1, f2 * np.cos(tilt))
    across = f2 * np.sin(tilt)
    passed = window(side, in_slice) * (in_slice < CUT[side])
    passed = passed * np.exp(-2 * (np.pi * SIGMA * in_slice) ** 2) * np.sinc(THICKNESS * across)
    image = np.fft.ifft2(tube(np.hypot(f1, f2), stent) * passed).real / step**2
    return np.fft.fftshift(image), step


def chambers(side):
    n = 4 * SIZE
    x = (np.arange(n) - (n - 1) / 2) * PIXEL / 4
    grid = np.zeros((n, n))
    for cx, cy, radius in CHAMBERS:
        grid[(x[None, :] - cx) ** 2 + (x[:, None] - cy) ** 2 <= radius**2] = 380 - TISSUE
    f = np.fft.fftfreq(n, PIXEL / 4)
    both = np.hypot(f[:, None], f[None, :])
    passed = window(side, both) * (both < CUT[side]) * np.exp(-2 * (np.pi * SIGMA * both) ** 2)
    image = np.fft.ifft2(np.fft.fft2(grid) * passed).real
    # Pixels lie between four fine ones each.
    return image.reshape(SIZE, 4, SIZE, 4)[:, 1:3, :, 1:3].mean(axis=(1, 3))


def noise(side, white):
    f = np.fft.fftfreq(SIZE, PIXEL)
    both = np.hypot(f[:, None], f[None, :])
    amplitude = np.sqrt(both) * window(side, both) * (both < CUT[side])
    sharp = np.sqrt(both) * window("sharp", both) * (both < CUT["sharp"])
    # Three layers in a slice: each has three times the variance.
    scale = NOISE * np.sqrt(3) / np.sqrt(np.mean(sharp**2))
    return np.fft.ifft2(np.fft.fft2(white, axes=(1, 2)) * amplitude * scale, axes=(1, 2)).real


def main(folder, seed, tilt_deg):
    random = np.random.default_rng(seed)
    tilt = np.radians(tilt_deg)
    azimuth = np.radians(random.uniform(-25, 25))
    stent = {
        "innerDiameterMm": random.uniform(2.5, 3.75),
        "strutMm": 0.1,
        "massHuMm": random.uniform(300, 700),
        "lumenHu": random.uniform(150, 420),
        "wallMm": random.uniform(0.3, 0.7),
    }
    bare = len(sys.argv) > 4 and sys.argv[4] == "bare"
    if bare:
        stent["massHuMm"] = 0.0
    centre = np.array([random.uniform(-1, 1), random.uniform(-1, 1), random.uniform(-0.2, 0.2)])
    axis = np.array([np.sin(tilt) * np.cos(azimuth), np.sin(tilt) * np.sin(azimuth), np.cos(tilt)])
    e1 = np.array([-np.sin(azimuth), np.cos(azimuth), 0.0])
    e2 = np.cross(axis, e1)
    slices = int(2 * HALF_Z / SPACING) + 1
    heights = (np.arange(slices) - (slices - 1) / 2) * SPACING
    layers = 2 * (slices - 1) + 3
    white = random.standard_normal((layers, SIZE, SIZE))
    x = (np.arange(SIZE) - (SIZE - 1) / 2) * PIXEL
    for side in ("soft", "sharp"):
        image, step = seen_tube(side, stent, tilt)
        room = chambers(side)
        thin = noise(side, white)
        volume = np.empty((slices, SIZE, SIZE))
        for k, z in enumerate(heights):
            away = np.stack(np.broadcast_arrays(x[None, :] - centre[0], x[:, None] - centre[1], z - centre[2]))
            a = np.tensordot(e1, away, 1) / step + 512
            b = np.tensordot(e2, away, 1) / step + 512
            lean = map_coordinates(image, [a, b], order=3, mode="nearest")
            volume[k] = TISSUE + lean + room + thin[2 * k : 2 * k + 3].mean(axis=0)
        np.rint(volume).clip(-32768, 32767).astype("<i2").tofile(f"{folder}/{side}.bin")
    with open(f"{folder}/truth.json", "w") as out:
        json.dump(
            {
                "size": SIZE,
                "pixelMm": PIXEL,
                "heightsMm": heights.tolist(),
                "thicknessMm": THICKNESS,
                "centreMm": centre.tolist(),
                "axis": axis.tolist(),
                "tiltDeg": tilt_deg,
                **stent,
            },
            out,
        )


if __name__ == "__main__":
    main(sys.argv[1], int(sys.argv[2]), float(sys.argv[3]))

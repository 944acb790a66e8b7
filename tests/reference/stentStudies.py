"""Pairs of reconstructions of stents, made without the program: analytic line integrals in numpy, photon noise by numpy,
filters of our own in numpy's FFT, back projection by scikit-image. Struts are rings or 8 to 16 wires.

stentStudies.py DIR SEED ring|wires   writes soft.bin, sharp.bin (int16 HU, slice after slice) and truth.json
"""
import json
import sys

import numpy as np
from skimage.transform import iradon

PITCH = 0.35  # mm, also the pixel
SIZE = 288
VIEWS = 400
WATER = 0.02059  # per mm
SIGMA = 0.2  # mm, blur of focal spot and detector
HEIGHTS = [-0.5, 0.0, 0.5]
PLACES = [(0, -5), (0, -38), (-36, 2), (16, 8), (-18, 6), (26, 26), (-28, 29)]
CHAMBERS = [(-23, -23, 12), (24, -21, 11), (-2, 27, 12)]


def add_disc(sinogram, t, angles, centre, radii, turn, hu):
    """Adds the mean line integral over each fine ray's width of an ellipse of this HU above what is there."""
    x, y = centre
    a, b = radii
    for view, theta in enumerate(angles):
        u, v = np.cos(theta - turn), np.sin(theta - turn)
        reach = np.hypot(a * u, b * v)
        step = t[1] - t[0]
        middle = x * np.cos(theta) + y * np.sin(theta)
        start = max(0, int((middle - reach - t[0]) / step) - 1)
        end = int((middle + reach - t[0]) / step) + 3
        d = t[start:end] - middle

        def area(z):
            z = np.clip(z / reach, -1, 1)
            return (z * np.sqrt(1 - z * z) + np.arcsin(z)) * a * b

        sinogram[view, start:end] += hu * (area(d + step / 2) - area(d - step / 2)) / step


def vessel(sinogram, t, angles, stent, z):
    tilt, azimuth = np.radians(stent["tiltDeg"]), np.radians(stent["azimuthDeg"])
    centre = np.array(stent["centreMm"]) + z * np.tan(tilt) * np.array([np.cos(azimuth), np.sin(azimuth)])
    stretch = 1 / np.cos(tilt)
    wall_hu, fat_hu = 60.0, -90.0
    inner = stent["innerDiameterMm"] / 2
    middle, outer = inner + stent["strutMm"] / 2, inner + stent["strutMm"]
    radius = outer + stent["wallMm"]
    disc = lambda r, hu, c=centre: add_disc(sinogram, t, angles, c, (r * stretch, r), azimuth, hu)
    disc(radius, wall_hu - fat_hu)
    if stent["wires"] == 0:
        strut = stent["massHuMm"] / stent["strutMm"]
        disc(outer, strut)
        disc(inner, stent["lumenHu"] - wall_hu - strut)
        return
    disc(middle, stent["lumenHu"] - wall_hu)
    wire = stent["strutMm"] / 2
    hu = stent["massHuMm"] * 2 * np.pi * middle / (stent["wires"] * np.pi * wire * wire)
    for k in range(stent["wires"]):
        # Struts of the next slice stand elsewhere on the ring.
        phase = 2 * np.pi * (k + stent["phase"] + z * 0.8) / stent["wires"]
        along, across = middle * np.cos(phase) * stretch, middle * np.sin(phase)
        place = centre + np.array(
            [
                along * np.cos(azimuth) - across * np.sin(azimuth),
                along * np.sin(azimuth) + across * np.cos(azimuth),
            ]
        )
        add_disc(sinogram, t, angles, place, (wire, wire), 0.0, hu)


def filtered(sinogram, window, cut_off):
    n = 2 ** int(np.ceil(np.log2(2 * sinogram.shape[1])))
    taps = np.zeros(n)
    taps[0] = 1 / (4 * PITCH**2)
    odd = np.arange(1, n // 2 + 1, 2)
    taps[odd] = -1 / (np.pi * odd * PITCH) ** 2
    taps[-odd] = taps[odd]
    ramp = np.real(np.fft.fft(taps)) * PITCH
    x = np.abs(np.fft.fftfreq(n, PITCH)) / cut_off
    shape = {
        "hann": 0.5 + 0.5 * np.cos(np.pi * x),
        "cosine": np.cos(np.pi * x / 2),
        "gauss": np.exp(-1.5 * x * x),
    }[window]
    response = ramp * np.where(x <= 1, shape, 0 if window != "gauss" else shape)
    return np.real(np.fft.ifft(np.fft.fft(sinogram, n, axis=1) * response, axis=1))[:, : sinogram.shape[1]]


def main(folder, seed, kind):
    random = np.random.default_rng(seed)
    stents = []
    for x, y in PLACES:
        stents.append(
            {
                "centreMm": [x + random.uniform(-0.5, 0.5), y + random.uniform(-0.5, 0.5)],
                "innerDiameterMm": random.uniform(2.25, 4),
                "strutMm": random.uniform(0.08, 0.12),
                "massHuMm": random.uniform(250, 700),
                "lumenHu": random.uniform(60, 450),
                "wallMm": random.uniform(0.3, 0.8),
                "tiltDeg": random.uniform(0, 15),
                "azimuthDeg": random.uniform(0, 360),
                "wires": int(random.integers(8, 17)) if kind == "wires" else 0,
                "phase": random.uniform(0, 1),
            }
        )
    photons = 10 ** random.uniform(4.0, 4.5)
    soft = [("hann", 0.65), ("hann", 0.8), ("gauss", 0.5)][seed % 3]
    sharp = [("cosine", 1.2), ("hann", 1.35), ("cosine", 1.3)][seed % 3]
    angles = np.pi * np.arange(VIEWS) / VIEWS
    fine = 8
    detectors = 352
    first = -(detectors // 2) * PITCH
    reach = int(np.ceil(4 * SIGMA * fine / PITCH))
    t = first + (np.arange((detectors - 1) * fine + 2 * reach + 1) - reach) * PITCH / fine
    kernel = np.exp(-0.5 * ((np.arange(2 * reach + 1) - reach) * PITCH / fine / SIGMA) ** 2)
    kernel /= kernel.sum()
    images = {"soft": [], "sharp": []}
    for z in HEIGHTS:
        rays = np.zeros((VIEWS, t.size))
        # HU above air, so that air is 0.
        add_disc(rays, t, angles, (0, 0), (54, 54), 0.0, 1060.0)
        for x, y, radius in CHAMBERS:
            add_disc(rays, t, angles, (x, y), (radius, radius), 0.0, 320.0)
        for stent, (x, y) in zip(stents, PLACES):
            add_disc(rays, t, angles, (x, y), (6, 6), 0.0, -150.0)
            vessel(rays, t, angles, stent, z)
        blurred = np.array([np.convolve(row, kernel, "valid")[::fine] for row in rays])
        lines = blurred / 1000 * WATER
        counted = random.poisson(photons * np.exp(-lines))
        noisy = np.log(photons / np.maximum(counted, 0.5))
        for side, (window, cut_off) in (("soft", soft), ("sharp", sharp)):
            q = filtered(noisy, window, cut_off)
            # iradon turns clockwise from the row axis and wants detectors down the rows; its middle is size // 2.
            image = iradon(q.T, theta=np.degrees(angles), filter_name=None, circle=True, output_size=SIZE)
            # Its own filters hold a factor of 2 that ours don't; its rows run against y.
            images[side].append(np.rint(2 * image[::-1] * 1000 / WATER - 1000))
    for side, stack in images.items():
        np.clip(stack, -1024, 32000).astype("<i2").tofile(f"{folder}/{side}.bin")
    with open(f"{folder}/truth.json", "w") as out:
        json.dump(
            {"size": SIZE, "pixelMm": PITCH, "heightsMm": HEIGHTS, "firstMm": [-(SIZE // 2) * PITCH, -(SIZE - 1 - SIZE // 2) * PITCH], "photons": photons, "soft": soft, "sharp": sharp, "stents": stents},
            out,
        )


main(sys.argv[1], int(sys.argv[2]), sys.argv[3])

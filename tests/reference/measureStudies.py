"""Writes studies as DICOM files with pydicom, and measures them with numpy: nothing here is shared with the program.

Usage: python3 measureStudies.py FOLDER
Makes FOLDER/equal and FOLDER/unlike with images, and beside each 'plan-NAME.json' and 'expected-NAME.json'.
"""
import json
import os
import sys

import numpy as np
from pydicom.dataset import FileDataset, FileMetaDataset
from pydicom.uid import CTImageStorage, ExplicitVRLittleEndian, ImplicitVRLittleEndian

ROOT = "1.2.826.0.1.3680043.10.999."


def unit(vector):
    return np.asarray(vector, float) / np.linalg.norm(vector)


class Stack:
    """One reconstruction: geometry, encoding and stored values, from which files and figures are both made."""

    def __init__(self, number, kernel, origin, row, column, spacing, rows, columns, count, step,
                 signed, slopes, intercepts, padding=None, bits=16, syntax=ExplicitVRLittleEndian, seed=1):
        self.uid = f"{ROOT}2.{number}"
        self.number, self.kernel = number, kernel
        # What the file holds is what counts: DS has 16 characters, so geometry is rounded before use.
        ds = lambda values: np.array([float(f"{v:.10f}"[:16]) for v in values])
        self.row, self.column = ds(unit(row)), ds(unit(column))
        normal = np.cross(self.row, self.column)
        self.positions = [ds(np.asarray(origin, float) + normal * step * k) for k in range(count)]
        self.spacing = ds(spacing)
        self.rows, self.columns = rows, columns
        self.signed, self.padding, self.bits, self.syntax = signed, padding, bits, syntax
        self.slopes, self.intercepts = slopes, intercepts
        rng = np.random.default_rng(seed)
        low, high = (-900, 1900) if signed else (0, 3900)
        self.stored = [rng.integers(low, high, (rows, columns)) for _ in range(count)]
        if padding is not None:
            for image in self.stored:
                image[rng.random(image.shape) < 0.05] = padding

    def write(self, folder):
        for k, stored in enumerate(self.stored):
            meta = FileMetaDataset()
            meta.MediaStorageSOPClassUID = CTImageStorage
            meta.MediaStorageSOPInstanceUID = self.sop(k)
            meta.TransferSyntaxUID = self.syntax
            d = FileDataset(None, {}, file_meta=meta, preamble=b"\0" * 128)
            d.is_little_endian = True
            d.is_implicit_VR = self.syntax == ImplicitVRLittleEndian
            d.SpecificCharacterSet = "ISO_IR 192"
            d.ImageType = ["DERIVED", "PRIMARY", "AXIAL"]
            d.SOPClassUID, d.SOPInstanceUID = CTImageStorage, self.sop(k)
            d.Modality, d.Manufacturer = "CT", "Synthetic"
            d.PatientName, d.PatientID = "Synthetic^Study", "SYN-1"
            d.StudyInstanceUID, d.SeriesInstanceUID = f"{ROOT}1", self.uid
            d.FrameOfReferenceUID = f"{ROOT}3"
            d.SeriesNumber, d.AcquisitionNumber = self.number, 1
            # Numbers against the order of positions: order must come from geometry.
            d.InstanceNumber = len(self.stored) - k
            d.ConvolutionKernel, d.KVP, d.SliceThickness = self.kernel, 120, 0.6
            d.ImagePositionPatient = [f"{v:.10f}"[:16] for v in self.positions[k]]
            d.ImageOrientationPatient = [f"{v:.10f}"[:16] for v in [*self.row, *self.column]]
            d.PixelSpacing = [f"{v:.10f}"[:16] for v in self.spacing]
            d.SamplesPerPixel, d.PhotometricInterpretation = 1, "MONOCHROME2"
            d.Rows, d.Columns = self.rows, self.columns
            d.BitsAllocated, d.BitsStored, d.HighBit = 16, self.bits, self.bits - 1
            d.PixelRepresentation = int(self.signed)
            d.RescaleSlope, d.RescaleIntercept, d.RescaleType = self.slopes[k], self.intercepts[k], "HU"
            if self.padding is not None:
                d.PixelPaddingValue = self.padding
            kind = "<i2" if self.signed else "<u2"
            words = stored.astype(kind)
            if self.bits < 16:
                # Bits above the stored ones are not part of the value (PS3.5 8.1.1).
                words = ((words.view("<u2") & (2**self.bits - 1)) | 0x5000).astype("<u2")
            d.PixelData = words.tobytes()
            d["PixelData"].VR = "OW"
            # Names say nothing of the order.
            name = f"{(k * 7 + self.number * 3) % 97:02d}-{self.number}-{k}"
            d.save_as(os.path.join(folder, name), write_like_original=False)

    def sop(self, k):
        return f"{self.uid}.{k + 1}"

    def centres(self, k):
        """Pixel centres, PS3.3 equation C.7.6.2.1-1: column index with the second spacing, row index with the first."""
        j, i = np.mgrid[0:self.rows, 0:self.columns]
        return (self.positions[k] + i[..., None] * self.spacing[1] * self.row
                + j[..., None] * self.spacing[0] * self.column)

    def along(self, point):
        return float(np.dot(point, np.cross(self.row, self.column)))

    def measure(self, shape):
        points = np.array([shape["centreMm"]] if shape["kind"] == "ellipse" else shape["pointsMm"], float)
        where = [self.along(p) for p in self.positions]
        offsets = np.array(where) - self.along(points.mean(axis=0))
        k = int(np.argmin(np.abs(offsets)))
        if abs(offsets[k]) > np.median(np.diff(where)) / 2:
            return None
        inside = (in_ellipse if shape["kind"] == "ellipse" else in_outline)(self, self.centres(k), shape)
        stored = self.stored[k][inside]
        if self.padding is not None:
            stored = stored[stored != self.padding]
        hu = stored * float(self.slopes[k]) + float(self.intercepts[k])
        if len(hu) < 2:
            raise SystemExit("a test region needs pixels")
        return {"n": int(len(hu)), "meanHu": float(np.mean(hu)), "sdHu": float(np.std(hu, ddof=1)),
                "minHu": float(hu.min()), "maxHu": float(hu.max()), "medianHu": float(np.median(hu)),
                "snr": float(np.mean(hu) / np.std(hu, ddof=1)), "areaMm2": area(shape),
                "sampledAreaMm2": float(len(hu) * np.prod(self.spacing)), "sliceIndex": k,
                "sliceOffsetMm": float(offsets[k]), "sopInstanceUid": self.sop(k)}


def in_ellipse(stack, centres, shape):
    u, v = np.array(shape.get("u", stack.row)), np.array(shape.get("v", stack.column))
    d = centres - np.array(shape["centreMm"])
    r = (d @ u / shape["radiiMm"][0]) ** 2 + (d @ v / shape["radiiMm"][1]) ** 2
    # No pixel centre may lie so near to the edge that rounding decides.
    assert np.abs(r - 1).min() > 1e-7, "choose another ellipse"
    return r <= 1


def in_outline(stack, centres, shape):
    """Even-odd rule by crossing edges, in the slice's own axes."""
    flat = lambda p: np.stack([p @ stack.row, p @ stack.column], axis=-1)
    c, polygon = flat(centres), flat(np.array(shape["pointsMm"], float))
    inside = np.zeros(c.shape[:2], bool)
    for (x0, y0), (x1, y1) in zip(polygon, np.roll(polygon, -1, axis=0)):
        crosses = (y0 > c[..., 1]) != (y1 > c[..., 1])
        with np.errstate(divide="ignore", invalid="ignore"):
            x = x0 + (c[..., 1] - y0) * (x1 - x0) / (y1 - y0)
        inside ^= crosses & (c[..., 0] < x)
    return inside


def area(shape):
    if shape["kind"] == "ellipse":
        return float(np.pi * np.prod(shape["radiiMm"]))
    p = np.array(shape["pointsMm"], float)
    return float(np.linalg.norm(np.cross(p - p[0], np.roll(p, -1, axis=0) - p[0]).sum(axis=0)) / 2)


def contrasts(regions, kernel):
    r = {x["id"]: x[kernel] for x in regions}
    difference = r["L1"]["meanHu"] - r["W1"]["meanHu"]
    noise = {"lumen": r["L1"]["sdHu"], "wall": r["W1"]["sdHu"], "reference": r["R1"]["sdHu"],
             "pooled": float(np.sqrt((r["L1"]["sdHu"] ** 2 + r["W1"]["sdHu"] ** 2) / 2))}
    return {name: difference / value for name, value in noise.items()}


def study(folder, name, soft, sharp, shapes):
    images = os.path.join(folder, name)
    os.makedirs(images)
    soft.write(images)
    sharp.write(images)
    plan = {"plan": 1, "pair": {"soft": {"seriesInstanceUid": soft.uid}, "sharp": {"seriesInstanceUid": sharp.uid}},
            "regions": [{"id": i, "role": role, "shape": shape} for i, role, shape in shapes],
            "contrasts": [{"id": f"C-{noise}", "lumen": "L1", "wall": "W1", "noise": noise, "reference": "R1"}
                          for noise in ["lumen", "wall", "reference", "pooled"]]}
    regions = [{"id": i, "soft": soft.measure(shape), "sharp": sharp.measure(shape)} for i, _, shape in shapes]
    expected = {"regions": regions, "soft": contrasts(regions, "soft"), "sharp": contrasts(regions, "sharp")}
    for what, value in [("plan", plan), ("expected", expected)]:
        with open(os.path.join(folder, f"{what}-{name}.json"), "w") as file:
            json.dump(value, file)


def at(stack, column, row, k, lift=0.0):
    """A place in patient space by fractional pixel indices of a slice, lifted along the normal."""
    normal = np.cross(stack.row, stack.column)
    p = (stack.positions[k] + column * stack.spacing[1] * stack.row
         + row * stack.spacing[0] * stack.column + lift * normal)
    return [float(x) for x in p]


def outline(stack, corners, k, lift=0.0):
    return {"kind": "outline", "pointsMm": [at(stack, c, r, k, lift) for c, r in corners]}


def shapes_on(soft, k, lift):
    """Ellipses with and without axes of their own, a star that is not convex, and a large disc."""
    turn = np.deg2rad(33)
    u = np.cos(turn) * soft.row + np.sin(turn) * soft.column
    v = -np.sin(turn) * soft.row + np.cos(turn) * soft.column
    star = [(31.3 + (9.7 if q % 2 else 4.3) * np.cos(q * np.pi / 5 + 0.2),
             27.6 + (9.7 if q % 2 else 4.3) * np.sin(q * np.pi / 5 + 0.2)) for q in range(10)]
    return [
        ("L1", "lumen", {"kind": "ellipse", "centreMm": at(soft, 20.37, 22.71, k, lift), "radiiMm": [2.113, 1.717]}),
        ("W1", "wall", {"kind": "ellipse", "centreMm": at(soft, 35.13, 18.29, k, lift), "u": u.tolist(),
                        "v": v.tolist(), "radiiMm": [3.317, 1.219]}),
        ("R1", "reference", {"kind": "ellipse", "centreMm": at(soft, 28.41, 30.53, k + 1, lift), "radiiMm": [6.131, 6.131]}),
        ("P1", "plaque", outline(soft, star, k, lift)),
        ("F1", "fat", outline(soft, [(15.31, 36.17), (33.77, 37.93), (24.19, 45.61)], k, -lift)),
    ]


def main(folder):
    soft = Stack(1, "S1", [-14.3, -20.1, 100.0], [1, 0, 0], [0, 1, 0], [0.5, 0.5], 56, 64, 6, 0.6,
                 True, [1] * 6, [0] * 6, seed=11)
    sharp = Stack(2, "H1", [-14.3, -20.1, 100.0], [1, 0, 0], [0, 1, 0], [0.5, 0.5], 56, 64, 6, 0.6,
                  False, [1] * 6, [-1024] * 6, seed=12, syntax=ImplicitVRLittleEndian)
    study(folder, "equal", soft, sharp, shapes_on(soft, 2, 0.1))

    row = unit([0.94, 0.31, 0.14])
    column = unit(np.cross([0.05, -0.2, 1.0], row))
    soft = Stack(3, "S1", [12.0, -83.0, 41.5], row, column, [0.47, 0.53], 60, 64, 7, 0.75,
                 True, [1, 0.5, 1.25, 0.75, 2, 1, 0.9], [-10, 5, 12.5, -1000, 3, 0, 7],
                 padding=-1500, seed=13)
    corner = soft.positions[0] + 3.3 * soft.row + 2.7 * soft.column - 0.2 * np.cross(soft.row, soft.column)
    sharp = Stack(4, "H1", corner, row, column, [0.31, 0.29], 80, 88, 11, 0.5,
                  False, [0.5 + 0.1 * k for k in range(11)], [-1024 + 3 * k for k in range(11)],
                  padding=4095, bits=12, seed=14)
    study(folder, "unlike", soft, sharp, shapes_on(soft, 2, 0.13))


main(sys.argv[1])

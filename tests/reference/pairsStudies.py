"""Writes studies of soft and sharp stacks as DICOM files with pydicom; images are made by numpy and scipy alone.

Usage: python3 pairsStudies.py FOLDER

A body of smooth ellipses and white noise, both on a fine grid, pass the same filter for a kernel (noise a ramp's share
of it too, as in filtered back projection), and are sampled onto each stack's own pixels. Labels mean nothing: kernels,
descriptions and series numbers are given against the truth or at random. Prints the truth as one JSON document:
for each folder under FOLDER the pairs as [soft series, sharp series, phase].
"""
import json
import os
import sys
from functools import lru_cache

import numpy as np
from pydicom.dataset import FileDataset, FileMetaDataset
from pydicom.uid import CTImageStorage, ExplicitVRLittleEndian
from scipy.ndimage import map_coordinates

ROOT = "1.2.826.0.1.3680043.10.998."
FINE, SIZE = 0.25, 512
FREQUENCY = np.hypot(*np.meshgrid(np.fft.fftfreq(SIZE, FINE), np.fft.fftfreq(SIZE, FINE), indexing="ij"))
AXIS = (np.arange(SIZE) - SIZE / 2) * FINE


def apodisation(kernel):
    """Soft: Hann to 0.65 per mm. Sharp: raised cosine, wider, to 1.15 per mm."""
    end = {"soft": 0.65, "sharp": 1.15}[kernel]
    inside = FREQUENCY < end
    return np.where(inside, 0.5 + 0.5 * np.cos(np.pi * FREQUENCY / end), 0) ** (1 if kernel == "soft" else 0.5)


def body(z, patient, phase):
    """HU on the fine grid: an invented heart that moves with the phase, in fat, between lungs and a wall."""
    x, y = np.meshgrid(AXIS, AXIS, indexing="xy")
    image = np.full((SIZE, SIZE), -850.0)
    move = 0.0 if phase == 75 else 4.0

    def paint(cx, cy, rx, ry, hu):
        distance = (np.hypot((x - cx) / rx, (y - cy) / ry) - 1) * min(rx, ry)
        inside = 0.5 - 0.5 * np.clip(distance / FINE, -1, 1)
        image[:] = image * (1 - inside) + hu * inside

    paint(0, 0, 54, 47, -95)
    paint(-6 + 2 * patient, -3, 38 - move, 33, 95)
    paint(-18 + 0.1 * z, -8 + patient, 13 - move / 2, 15, 380)
    paint(14, -6 + move, 12, 13 + 2 * patient, 340)
    paint(-2, 17, 11, 8, 300)
    paint(28 + 0.5 * z + move, 22 - 0.3 * z, 2.2, 2.2, 420)
    paint(-32 - 0.4 * z, 20 + move, 2.0, 2.0, 420)
    paint(2, 40, 7, 4, 600)
    return image


@lru_cache(maxsize=64)
def acquired(z, patient, phase):
    """What both kernels share: the body's spectrum with that of the noise, its power rising with frequency."""
    seed = [patient, phase, int(round(z * 1000)) + 100000]
    white = np.random.default_rng(seed).normal(0, 108, (SIZE, SIZE))
    return np.fft.fft2(body(z, patient, phase)) + np.fft.fft2(white) * np.sqrt(FREQUENCY)


def reconstruct(z, patient, phase, kernel):
    return np.real(np.fft.ifft2(acquired(z, patient, phase) * apodisation(kernel)))


class Stack:
    def __init__(self, uid, number, kernel, label, phase=75, patient=0, matrix=256, field=115.2, centre=(0.0, 0.0),
                 first=0.0, step=0.5, count=10, shift=(0.0, 0.0), acquisition=3):
        vars(self).update(locals())

    def write(self, folder, sop):
        spacing = round(self.field / self.matrix, 6)
        corner = [round(c - (self.matrix - 1) / 2 * spacing, 4) for c in self.centre]
        for k in range(self.count):
            z = round(self.first + k * self.step, 4)
            image = reconstruct(z, self.patient, self.phase, self.kernel)
            # A shift moves the body, not the pixels: the image at a place shows what was beside it.
            along = [(corner[i] + np.arange(self.matrix) * spacing - self.shift[i]) / FINE + SIZE / 2 for i in (0, 1)]
            rows, columns = np.meshgrid(along[1], along[0], indexing="ij")
            hu = map_coordinates(image, [rows, columns], order=3)
            self.write_slice(folder, sop, k, z, corner, spacing, hu)

    def write_slice(self, folder, sop, k, z, corner, spacing, hu):
        meta = FileMetaDataset()
        meta.MediaStorageSOPClassUID = CTImageStorage
        meta.MediaStorageSOPInstanceUID = f"{self.uid}.{sop}.{k}"
        meta.TransferSyntaxUID = ExplicitVRLittleEndian
        d = FileDataset(None, {}, file_meta=meta, preamble=b"\0" * 128)
        d.is_little_endian, d.is_implicit_VR = True, False
        d.ImageType = ["DERIVED", "PRIMARY", "AXIAL"]
        d.SOPClassUID, d.SOPInstanceUID = CTImageStorage, meta.MediaStorageSOPInstanceUID
        d.Modality, d.Manufacturer = "CT", "Synthetic"
        d.PatientName, d.PatientID = f"Synthetic^Study {self.patient}", f"SYN-{self.patient}"
        d.StudyInstanceUID, d.FrameOfReferenceUID = f"{ROOT}1.{self.patient}", f"{ROOT}3.{self.patient}"
        d.SeriesInstanceUID, d.SeriesNumber = self.uid, self.number
        d.SeriesDescription = f"series {self.number}"
        d.AcquisitionNumber, d.AcquisitionDate, d.AcquisitionTime = self.acquisition, "20260105", "101500"
        d.ConvolutionKernel, d.KVP, d.SliceThickness = self.label, 100, 0.6
        d.NominalPercentageOfCardiacPhase = float(self.phase)
        d.ContrastBolusAgent = "SYNTHETIC"
        d.ImagePositionPatient = [corner[0], corner[1], z]
        d.ImageOrientationPatient = [1, 0, 0, 0, 1, 0]
        d.PixelSpacing = [spacing, spacing]
        d.InstanceNumber = k + 1
        d.SamplesPerPixel, d.PhotometricInterpretation = 1, "MONOCHROME2"
        d.Rows = d.Columns = self.matrix
        d.BitsAllocated, d.BitsStored, d.HighBit, d.PixelRepresentation = 16, 16, 15, 1
        d.RescaleSlope, d.RescaleIntercept, d.RescaleType = 1, -1024, "HU"
        d.PixelData = np.clip(np.round(hu + 1024), -32768, 32767).astype("<i2").tobytes()
        d["PixelData"].VR = "OW"
        d.save_as(os.path.join(folder, f"{self.number}-{sop}-{k}"), write_like_original=False)


STUDIES = {
    # Same grid; the sharp series has the lower number and a label that sounds soft.
    "grid": ([Stack(f"{ROOT}2.11", 2, "sharp", "Calm"), Stack(f"{ROOT}2.12", 5, "soft", "Vivid")],
             [(f"{ROOT}2.12", f"{ROOT}2.11", 75)]),
    # Another field of view, centre and increment; one label for both.
    "field": ([Stack(f"{ROOT}2.21", 4, "soft", "X"),
               Stack(f"{ROOT}2.22", 6, "sharp", "X", field=92.16, centre=(4.1, -3.3), first=0.2, step=0.4, count=12)],
              [(f"{ROOT}2.21", f"{ROOT}2.22", 75)]),
    # Two phases in each of two series, a copy of one soft stack, and another patient's soft and sharp.
    "phases": ([Stack(f"{ROOT}2.31", 3, "sharp", "K1", phase=40), Stack(f"{ROOT}2.31", 3, "sharp", "K1", phase=75),
                Stack(f"{ROOT}2.32", 7, "soft", "K2", phase=40), Stack(f"{ROOT}2.32", 7, "soft", "K2", phase=75),
                Stack(f"{ROOT}2.33", 8, "soft", "K3", phase=75),
                Stack(f"{ROOT}2.34", 1, "soft", "K1", patient=1), Stack(f"{ROOT}2.35", 9, "sharp", "K2", patient=1)],
               [(f"{ROOT}2.32", f"{ROOT}2.31", 40), (f"{ROOT}2.32", f"{ROOT}2.31", 75),
                (f"{ROOT}2.33", f"{ROOT}2.31", 75), (f"{ROOT}2.34", f"{ROOT}2.35", 75)]),
    # The sharp stack lies 0.6 mm beside its place: more than half a pixel (0.225 mm).
    "moved": ([Stack(f"{ROOT}2.41", 1, "soft", "A"), Stack(f"{ROOT}2.42", 2, "sharp", "B", shift=(0.5, -0.33))],
              [(f"{ROOT}2.41", f"{ROOT}2.42", 75)]),
}

for name, (stacks, _) in STUDIES.items():
    folder = os.path.join(sys.argv[1], name)
    os.makedirs(folder)
    for sop, stack in enumerate(stacks):
        stack.write(folder, sop)
print(json.dumps({name: truth for name, (_, truth) in STUDIES.items()}))

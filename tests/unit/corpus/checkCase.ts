import { expect } from 'vitest';
import { type CorpusReading, readCorpusFolder } from '../../corpus/readCorpusFolder.js';
import type { RowCase } from '../../corpus/row.js';

/**
 * Reads a case and holds it to its verdict. READ has no finding at all and nothing left out; READ+ has the finding
 * of its code; SKIP and REFUSE have an entry or a finding with the code and a sentence. Values are checked wherever
 * the case states them.
 */
export async function checkCase(one: RowCase): Promise<CorpusReading> {
  const reading = await readCorpusFolder(one);
  const { stacks, leftOut } = reading.index;
  const findings = [...stacks.flatMap((stack) => stack.findings), ...(reading.pixelFindings ?? [])];
  const told = [...findings, ...leftOut, ...(reading.refusal ? [reading.refusal] : [])];
  const shown = JSON.stringify(told);
  if (one.verdict === 'READ') {
    expect(findings, shown).toEqual([]);
    expect(leftOut, shown).toEqual([]);
  }
  if (one.verdict === 'READ+') {
    expect(
      findings.map(({ code }) => code),
      shown,
    ).toContain(one.code);
    expect(leftOut, shown).toEqual([]);
  }
  if (one.verdict === 'SKIP') {
    expect(
      leftOut.map(({ code }) => code),
      shown,
    ).toContain(one.code);
  }
  if (one.verdict === 'REFUSE') {
    expect(
      told.map(({ code }) => code),
      shown,
    ).toContain(one.code);
  }
  for (const { text } of told) expect(text).toMatch(/\.$/);
  if (one.says !== undefined) {
    const sentence = told.find(
      ({ code, text }) => code === one.code && text.includes(one.says ?? ''),
    );
    expect(sentence, `${shown} should say: ${one.says}`).toBeDefined();
  }
  if (one.verdict === 'READ' || one.verdict === 'READ+') expect(stacks).not.toEqual([]);
  else if (one.image === undefined && one.verdict === 'SKIP') expect(stacks).toEqual([]);
  if (one.image !== undefined) expect(stacks[0]?.slices[0].image).toMatchObject(one.image);
  for (const path of one.absent ?? []) {
    expect(stacks[0]?.slices[0].image, shown).toBeDefined();
    expect(stacks[0]?.slices[0].image).not.toHaveProperty(path);
  }
  if (one.stored !== undefined) {
    expect([...(reading.stored ?? [])].slice(0, one.stored.length)).toEqual(one.stored);
  }
  return reading;
}

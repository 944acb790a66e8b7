import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';

// electron-builder's own schema and the validator and parser that it uses itself.
const here = createRequire(import.meta.url);
const builder = createRequire(here.resolve('app-builder-lib/package.json'));
const { load } = builder('js-yaml') as { load(text: string): Record<string, unknown> };
const { default: Ajv } = builder('ajv') as {
  default: new (options: object) => { compile(schema: object): Validator };
};
type Validator = ((value: unknown) => boolean) & { errors?: readonly { params: object }[] | null };

const validate = new Ajv({ strict: false, allErrors: true }).compile(
  builder('app-builder-lib/scheme.json') as object,
);
const TEXT = readFileSync('electron-builder.yml', 'utf8');
const config = load(TEXT);
const packageJson = JSON.parse(readFileSync('package.json', 'utf8')) as {
  readonly main: string;
  readonly productName: string;
  readonly devDependencies: Readonly<Record<string, string>>;
};

describe('electron-builder.yml', () => {
  it('is valid by the schema of app-builder-lib', () => {
    expect(validate(config), JSON.stringify(validate.errors)).toBe(true);
  });

  it.each([
    ['asar: true', 'asarr: true', 'asarr'],
    ['runAsNode: false', 'runAsNodes: false', 'runAsNodes'],
    ['hardenedRuntime: true', 'hardenRuntime: true', 'hardenRuntime'],
  ])('is refused with %s written as %s', (right, wrong, name) => {
    expect(TEXT).toContain(right);
    expect(validate(load(TEXT.replace(right, wrong)))).toBe(false);
    expect(JSON.stringify(validate.errors)).toContain(name);
  });

  it('sets every fuse as Electron’s security guide advises (item 19)', () => {
    expect(config.electronFuses).toEqual({
      runAsNode: false,
      enableNodeOptionsEnvironmentVariable: false,
      enableNodeCliInspectArguments: false,
      grantFileProtocolExtraPrivileges: false,
      enableEmbeddedAsarIntegrityValidation: true,
      onlyLoadAppFromAsar: true,
      enableCookieEncryption: true,
    });
  });

  it('packs into an archive, for three systems, and publishes nowhere', () => {
    expect(config).toMatchObject({
      asar: true,
      publish: null,
      linux: { target: ['AppImage', 'deb'] },
      win: { target: ['nsis'] },
      mac: { target: ['dmg'], hardenedRuntime: true, category: 'public.app-category.medical' },
    });
    // Nothing lies outside the archive, where its hash would not cover it.
    for (const key of ['asarUnpack', 'extraResources', 'extraFiles']) {
      expect(config).not.toHaveProperty(key);
    }
  });

  it('agrees with package.json', () => {
    expect(config.electronVersion).toBe(packageJson.devDependencies.electron);
    expect(config.productName).toBe(packageJson.productName);
    expect(packageJson.main).toBe('dist/app/main.js');
    expect(config.files).toEqual(
      expect.arrayContaining(['dist/**', 'package.json', 'assets/icons/icon.png']),
    );
  });
});

describe('icons', () => {
  /** Width and height stand at bytes 16 and 20 of a PNG (RFC 2083, 3.2 and 4.1.1). */
  it.each([
    ['icon.png', 1024],
    ['icon-512.png', 512],
    ['icon-256.png', 256],
  ])('%s is a square PNG of %i px', (name, side) => {
    const bytes = readFileSync(`assets/icons/${name}`);
    expect(bytes.subarray(0, 8).toString('hex')).toBe('89504e470d0a1a0a');
    expect([bytes.readUInt32BE(16), bytes.readUInt32BE(20)]).toEqual([side, side]);
  });
});

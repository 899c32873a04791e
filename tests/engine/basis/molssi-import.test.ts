import { describe, expect, it } from 'vitest';
import { parseMolssiBasis } from '../../../engine/basis/molssi-import';

type Json = Record<string, unknown>;

const sShell = {
  function_type: 'gto',
  region: '',
  angular_momentum: [0],
  exponents: ['0.1873113696E+02', '2.825394365', '.6401216923'],
  coefficients: [['0.03349460434', '+0.2347269535', '0.8137573261']],
};
const spShell = {
  function_type: 'gto',
  region: 'valence',
  angular_momentum: [0, 1],
  exponents: ['12.', '3e0'],
  coefficients: [
    ['0.6', '0.5'],
    ['-0.1', '1.05'],
  ],
};
const dShell = {
  function_type: 'gto_cartesian',
  region: 'polarization',
  angular_momentum: [2],
  exponents: ['0.8', '0.2'],
  coefficients: [
    ['1.0', '0.0'],
    ['0.5', '0.7'],
  ],
};
const file = (): Json => ({
  molssi_bse_schema: { schema_type: 'complete', schema_version: '0.1' },
  name: 'trial set',
  role: 'orbital',
  function_types: ['gto', 'gto_cartesian'],
  some_later_key: true,
  elements: {
    1: { electron_shells: [sShell], references: [{ reference_description: '', reference_keys: ['a1970a'] }] },
    6: { electron_shells: [spShell, dShell], references: [{ reference_keys: ['a1970a', 'b1980a'] }] },
    92: { ecp_electrons: 60 },
  },
});
const parse = (content: unknown) => parseMolssiBasis(JSON.stringify(content), 'set.json');
/** The file with one shell of carbon changed. */
const withShell = (change: Json, base: Json = spShell) => ({
  ...file(),
  elements: { 6: { electron_shells: [{ ...base, ...change }] } },
});

describe('parseMolssiBasis', () => {
  it('identity: shells, rows and numbers come out as they are written', () => {
    const set = parse(file());
    expect(set.name).toBe('trial set');
    expect(set.harmonics).toBe('cartesian');
    expect(set.elements).toEqual({
      H: [
        {
          angularMomentum: 0,
          exponents: [18.73113696, 2.825394365, 0.6401216923],
          coefficients: [0.03349460434, 0.2347269535, 0.8137573261],
        },
      ],
      C: [
        { angularMomentum: 0, exponents: [12, 3], coefficients: [0.6, 0.5] },
        { angularMomentum: 1, exponents: [12, 3], coefficients: [-0.1, 1.05] },
        { angularMomentum: 2, exponents: [0.8], coefficients: [1] },
        { angularMomentum: 2, exponents: [0.8, 0.2], coefficients: [0.5, 0.7] },
      ],
    });
    expect(set.citations.map((citation) => citation.key)).toEqual(['a1970a', 'b1980a']);
  });

  it('identity: only contractions whose self-overlap is off are remarked on', () => {
    expect(parse({ ...file(), elements: { 1: { electron_shells: [sShell] } } }).notes).toEqual([]);
    expect(parse(file()).notes.every((note) => note.startsWith('C, contraction'))).toBe(true);
    expect(parse(file()).notes.length).toBeGreaterThan(0);
  });

  it('identity: the minimal form needs neither name nor references', () => {
    const minimal = {
      molssi_bse_schema: { schema_type: 'minimal', schema_version: '0.1' },
      function_types: ['gto'],
      elements: { 1: { electron_shells: [sShell] } },
    };
    expect(parse(minimal)).toMatchObject({ name: 'set.json', harmonics: 'spherical', citations: [] });
  });

  it.each<[string, unknown, RegExp]>([
    [
      'another schema type',
      { ...file(), molssi_bse_schema: { schema_type: 'element', schema_version: '0.1' } },
      /schema_type: "element"/,
    ],
    [
      'another version',
      { ...file(), molssi_bse_schema: { schema_type: 'complete', schema_version: '0.2' } },
      /schema_version: "0.2"/,
    ],
    ['no schema marker', { ...file(), molssi_bse_schema: undefined }, /molssi_bse_schema: nothing/],
    ['a fitting set', { ...file(), role: 'jkfit' }, /role: "jkfit"/],
    ['no elements', { ...file(), elements: {} }, /elements: there is no element/],
    [
      'elements beyond argon only',
      { ...file(), elements: { 19: { electron_shells: [sShell] } } },
      /elements: there is no/,
    ],
    ['elements as a list', { ...file(), elements: [] }, /elements: \[\]/],
    [
      'an element without shells',
      { ...file(), elements: { 1: {} } },
      /elements\.1\.electron_shells: nothing/,
    ],
    [
      'a core potential',
      { ...file(), elements: { 11: { ecp_potentials: [], electron_shells: [] } } },
      /elements\.11\.ecp_potentials: Na has/,
    ],
    [
      'core electrons',
      { ...file(), elements: { 11: { ecp_electrons: 10 } } },
      /elements\.11\.ecp_electrons: Na has/,
    ],
    [
      'Slater functions',
      withShell({ function_type: 'sto' }),
      /electron_shells\[0\]\.function_type: C has Slater/,
    ],
    ['an unknown kind of function', withShell({ function_type: 'wave' }), /function_type: "wave"/],
    ['an h shell', withShell({ angular_momentum: [5] }, dShell), /row 0: C: The angular momentum 5/],
    ['a momentum that is no number', withShell({ angular_momentum: ['0'] }), /angular_momentum\[0\]: "0"/],
    [
      'more momenta than rows',
      withShell({ angular_momentum: [0, 1, 2] }),
      /3 angular momenta do not go with 2 rows/,
    ],
    ['no momentum', withShell({ angular_momentum: [] }), /0 angular momenta/],
    ['no rows', withShell({ coefficients: [] }), /0 rows/],
    [
      'a short row',
      withShell({ coefficients: [['1'], ['1', '2']] }),
      /row 0: C: There are 2 exponents but 1/,
    ],
    ['a D exponent', withShell({ exponents: ['1.2D+01', '3'] }), /exponents\[0\]: "1\.2D\+01"/],
    ['a number that is not text', withShell({ exponents: [12, '3'] }), /exponents\[0\]: 12/],
    ['an empty number', withShell({ exponents: ['', '3'] }), /exponents\[0\]: ""/],
    ['a hexadecimal number', withShell({ exponents: ['0x10', '3'] }), /exponents\[0\]: "0x10"/],
    ['an overflowing number', withShell({ exponents: ['1e999', '3'] }), /exponents\[0\]: "1e999"/],
    ['a negative exponent', withShell({ exponents: ['12', '-3'] }), /row 0: C: The exponent -3/],
    [
      'a vanishing function',
      withShell({
        coefficients: [
          ['0', '0'],
          ['1', '1'],
        ],
      }),
      /row 0: C: The primitives cancel/,
    ],
    [
      'both kinds of harmonics',
      {
        ...file(),
        elements: { 6: { electron_shells: [dShell, { ...dShell, function_type: 'gto_spherical' }] } },
      },
      /electron_shells\[1\]\.function_type: spherical and Cartesian/,
    ],
    [
      'references that are no list',
      { ...file(), elements: { 1: { electron_shells: [sShell], references: 'x' } } },
      /references: "x"/,
    ],
    ['a list', [], /\[\] stands where an object/],
    ['null', null, /null stands where an object/],
  ])('identity: %s is refused with its place', (_, content, message) => {
    expect(() => parse(content)).toThrow(
      expect.objectContaining({
        code: 'basis.file',
        place: 'basis.file',
        details: { file: 'set.json' },
        message: expect.stringMatching(message),
      }),
    );
  });

  it('identity: text that is not JSON, or cut short, is refused', () => {
    for (const text of ['', 'H 0\nS 3', JSON.stringify(file()).slice(0, -20)]) {
      expect(() => parseMolssiBasis(text, 'set.json')).toThrow(
        expect.objectContaining({ code: 'basis.file' }),
      );
    }
  });

  it('identity: a key named __proto__ changes nothing', () => {
    const text = JSON.stringify(file()).replace(
      '"elements":{',
      '"elements":{"__proto__":{"electron_shells":[]},',
    );
    expect(parseMolssiBasis(text, 'set.json').elements).toEqual(parse(file()).elements);
  });
});

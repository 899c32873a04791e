/** Papers that a report cites for what the program did. */
export const PAPERS = {
  restricted: 'C. C. J. Roothaan, Rev. Mod. Phys. 23, 69 (1951)',
  restrictedOpen: 'C. C. J. Roothaan, Rev. Mod. Phys. 32, 179 (1960)',
  unrestricted: 'J. A. Pople, R. K. Nesbet, J. Chem. Phys. 22, 571 (1954)',
  acceleration: 'P. Pulay, Chem. Phys. Lett. 73, 393 (1980)',
  stability: 'R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045 (1977)',
  secondOrder: 'C. Møller, M. S. Plesset, Phys. Rev. 46, 618 (1934)',
  singles: 'J. B. Foresman, M. Head-Gordon, J. A. Pople, M. J. Frisch, J. Phys. Chem. 96, 135 (1992)',
  determinants: 'J. Olsen, B. O. Roos, P. Jørgensen, H. J. Aa. Jensen, J. Chem. Phys. 89, 2185 (1988)',
  iterativeRoots: 'E. R. Davidson, J. Comput. Phys. 17, 87 (1975)',
  sizeCorrection: 'S. R. Langhoff, E. R. Davidson, Int. J. Quantum Chem. 8, 61 (1974)',
  integrals: 'L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26, 218 (1978)',
  screening: 'M. Häser, R. Ahlrichs, J. Comput. Chem. 10, 104 (1989)',
  unpaired: 'M. Head-Gordon, Chem. Phys. Lett. 372, 508 (2003)',
  dunham: 'J. L. Dunham, Phys. Rev. 41, 721 (1932)',
  interpolant: 'M. S. Floater, K. Hormann, Numer. Math. 107, 315 (2007)',
  condon: 'E. U. Condon, Phys. Rev. 32, 858 (1928)',
  radialRatios: 'B. R. Johnson, J. Chem. Phys. 67, 4086 (1977)',
  radialCorrection: 'J. W. Cooley, Math. Comp. 15, 363 (1961)',
  morse: 'P. M. Morse, Phys. Rev. 34, 57 (1929)',
  extendedRydberg: 'J. N. Murrell, K. S. Sorbie, J. Chem. Soc., Faraday Trans. 2 70, 1552 (1974)',
  counterpoise: 'S. F. Boys, F. Bernardi, Mol. Phys. 19, 553 (1970)',
  exponentialThreePoint: 'D. Feller, J. Chem. Phys. 96, 6104 (1992)',
  exponential: 'A. Halkier et al., Chem. Phys. Lett. 302, 437 (1999)',
  exponentialRoot: 'A. Karton, J. M. L. Martin, Theor. Chem. Acc. 115, 330 (2006)',
  inverseCube: 'T. Helgaker, W. Klopper, H. Koch, J. Noga, J. Chem. Phys. 106, 9639 (1997)',
  inverseFourth: 'J. M. L. Martin, Chem. Phys. Lett. 259, 669 (1996)',
  constants: 'P. J. Mohr, D. B. Newell, B. N. Taylor, E. Tiesinga, Rev. Mod. Phys. 97, 025002 (2025)',
} as const;

/** The references of one report, numbered in the order in which its text first names them. */
export class Citations {
  readonly #numbers = new Map<string, number>();

  /** `[1]`, `[2–4, 7]`; nothing for no references */
  cite(...references: readonly string[]): string {
    if (references.length === 0) return '';
    for (const reference of references) {
      if (!this.#numbers.has(reference)) this.#numbers.set(reference, this.#numbers.size + 1);
    }
    const numbers = [...new Set(references.map((reference) => this.#numbers.get(reference)!))];
    return `[${ranges(numbers.sort((a, b) => a - b))}]`;
  }

  /** in the order of their numbers */
  get list(): readonly string[] {
    return [...this.#numbers.keys()];
  }
}

/** Three or more in a row are drawn together. */
function ranges(numbers: readonly number[]): string {
  const runs: number[][] = [];
  for (const number of numbers) {
    const run = runs.at(-1);
    if (run?.at(-1) === number - 1) run.push(number);
    else runs.push([number]);
  }
  return runs.map((run) => (run.length > 2 ? `${run[0]}–${run.at(-1)}` : run.join(', '))).join(', ');
}

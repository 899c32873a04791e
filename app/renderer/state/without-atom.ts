import type { StudyDraft } from './draft';

/**
 * The draft without one atom. Later atoms move down by one, and so do the numbers by which the scan names
 * them; a bond to the atom removed goes with it.
 */
export function withoutAtom(draft: StudyDraft, removed: number): StudyDraft {
  const renumbered = (index: number) => (index > removed ? index - 1 : index);
  const { scan } = draft;
  const [a, b, c] = scan.angle;
  const [d, e, f, g] = scan.dihedral;
  return {
    ...draft,
    atoms: draft.atoms.filter((_, index) => index !== removed),
    scan: {
      ...scan,
      bonds: scan.bonds
        .filter((bond) => !bond.includes(removed))
        .map(([first, second]) => [renumbered(first), renumbered(second)] as const),
      angle: [renumbered(a), renumbered(b), renumbered(c)],
      dihedral: [renumbered(d), renumbered(e), renumbered(f), renumbered(g)],
    },
  };
}

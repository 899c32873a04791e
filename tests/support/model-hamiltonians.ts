import { type OrbitalIntegrals, packedPair } from '../../engine/integrals/orbital-integrals';

function emptyIntegrals(n: number): OrbitalIntegrals {
  const pairs = (n * (n + 1)) / 2;
  return {
    orbitalCount: n,
    coreEnergy: 0,
    oneElectron: new Float64Array(n * n),
    twoElectron: new Float64Array((pairs * (pairs + 1)) / 2),
  };
}

/** Sites in a ring (two: a bond), hopping −1 between neighbours, repulsion U on a site. */
export function hubbardRing(sites: number, repulsion: number): OrbitalIntegrals {
  const integrals = emptyIntegrals(sites);
  for (let site = 0; site < sites; site++) {
    const next = (site + 1) % sites;
    if (next !== site) {
      integrals.oneElectron[site * sites + next] = -1;
      integrals.oneElectron[next * sites + site] = -1;
    }
    integrals.twoElectron[packedPair(packedPair(site, site), packedPair(site, site))] = repulsion;
  }
  return integrals;
}

/**
 * H2 at 1.4 bohr in STO-3G over its two molecular orbitals, without nuclear repulsion, hartree: A. Szabo,
 * N. S. Ostlund, Modern Quantum Chemistry, sec. 3.5.2 (values from memory). Orbital energies follow from the rest.
 */
const PRINTED = { h11: -1.2528, h22: -0.4756, J11: 0.6746, J12: 0.6636, J22: 0.6975, K12: 0.1813 };
export const TEXTBOOK_HYDROGEN = {
  ...PRINTED,
  e1: PRINTED.h11 + PRINTED.J11,
  e2: PRINTED.h22 + 2 * PRINTED.J12 - PRINTED.K12,
};

/** So many of these molecules, each infinitely far from the others; bonding orbitals first. */
export function minimalHydrogens(molecules: number): OrbitalIntegrals {
  const n = 2 * molecules;
  const integrals = emptyIntegrals(n);
  const { h11, h22, J11, J12, J22, K12 } = TEXTBOOK_HYDROGEN;
  for (let bonding = 0; bonding < molecules; bonding++) {
    const anti = molecules + bonding;
    integrals.oneElectron[bonding * n + bonding] = h11;
    integrals.oneElectron[anti * n + anti] = h22;
    const set = (p: number, q: number, r: number, s: number, value: number) => {
      integrals.twoElectron[packedPair(packedPair(p, q), packedPair(r, s))] = value;
    };
    set(bonding, bonding, bonding, bonding, J11);
    set(anti, anti, anti, anti, J22);
    set(bonding, bonding, anti, anti, J12);
    set(bonding, anti, bonding, anti, K12);
  }
  return integrals;
}

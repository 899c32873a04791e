import type { SlaterShell } from './slater-fit';

/**
 * Starting exponents (bohr⁻²) for fits of 1 … 6 Gaussians: the best minima that many starts lead to, rounded, so
 * that the fit of a calculation takes a few steps. That nothing better is found from elsewhere is checked in
 * slater-fit.test.ts.
 */
export const FIT_START: Readonly<Record<SlaterShell, readonly (readonly number[])[]>> = {
  '1s': [
    [0.2709],
    [0.8518, 0.1516],
    [2.228, 0.4058, 0.1098],
    [5.217, 0.9546, 0.2652, 0.08802],
    [11.31, 2.072, 0.5786, 0.1976, 0.07445],
    [23.1, 4.236, 1.185, 0.4071, 0.1581, 0.06511],
  ],
  '2sp': [
    [0.1371],
    [0.3842, 0.09745],
    [0.9942, 0.231, 0.07514],
    [2.324, 0.503, 0.1635, 0.06281],
    [5.036, 1.033, 0.3291, 0.1279, 0.05449],
    [10.31, 2.04, 0.6341, 0.244, 0.106, 0.04857],
  ],
  '3sp': [
    [0.07164],
    [0.194, 0.06655],
    [0.4829, 0.1347, 0.05273],
    [0.9217, 0.2535, 0.09976, 0.0444],
    [1.709, 0.4654, 0.1785, 0.08067, 0.03915],
    [3.08, 0.8249, 0.3093, 0.1385, 0.06852, 0.03531],
  ],
};

/** The only door into the engine. */
export type { BasisRequest, EvenTemperedShells } from './basis/basis-request';
export type { Harmonics, ShellDefinition } from './basis/contracted-gaussian';
export { type BasisSetEntry, listBasisSets } from './basis/library-index';
export type { ScaleFactors } from './basis/scalable-basis';
export type {
  BasisFamilyMember,
  BasisSetLimit,
  EnergiesInBasis,
  LevelLimit,
  LimitCurve,
  LimitFormula,
  StudyInBasis,
} from './calculation/basis-comparison';
export { basisSetLimit } from './calculation/basis-set-limit';
export { type SolutionCrossing, studyCautions } from './calculation/cautions';
export {
  type ComputedPoint,
  type ComputePointOptions,
  computePoint,
} from './calculation/compute-point';
export { describeBasis, describeBasisUsed } from './calculation/describe-basis';
export { measuredFor } from './calculation/diatomic';
export { explainStudy } from './calculation/explain-study';
export type { BasisExplanation, LevelExplanation, StudyExplanation } from './calculation/explanation';
export { evaluateOnGrid, type FieldOnGrid } from './calculation/field-on-grid';
export { findLevelMinimum } from './calculation/find-level-minimum';
export { type FieldKind, type FollowedNeighbours, followNeighbours } from './calculation/follow-neighbours';
export { type FollowedState, followStates } from './calculation/follow-states';
export type {
  CurveFits,
  DunhamExpansion,
  ExcitedState,
  ExtendedRydbergFit,
  FitQuality,
  FranckCondon,
  Isotopologue,
  MorseFit,
  QuasiBoundLevel,
  RotatingLevel,
  RotatingLevels,
  TransitionMoment,
  VerticalExcitation,
} from './calculation/further-findings';
export { LEVEL_NAMES } from './calculation/levels';
export { basisSetLimitOfCurves, type CurveInBasis } from './calculation/limit-curve';
export type { OccupiedOrbitals, PointCarry } from './calculation/mean-fields';
export {
  type Preparation,
  type PreparedStudy,
  type PrepareOptions,
  prepareStudy,
} from './calculation/prepare-study';
export type { RaisedCaution } from './calculation/raised-caution';
export { LOW_REFERENCE_WEIGHT } from './calculation/reference-weight';
export type {
  AtomicCharges,
  BasisDescription,
  Caution,
  CautionNumber,
  CorrelatedResult,
  CorrelatedState,
  Counterpoise,
  DiatomicConstants,
  Dissociation,
  Estimate,
  FailedLevel,
  Fragment,
  FragmentSuperposition,
  HartreeFockResult,
  HigherMinimum,
  InstabilityOnset,
  LeadingConfiguration,
  LeadingDeterminant,
  LevelFindings,
  LevelResult,
  LevelTermination,
  NaturalOrbitals,
  NotAvailable,
  OrbitalLabels,
  PerturbationResult,
  PointResult,
  ReferenceWeightCrossing,
  ReferenceWeightFinding,
  ScaleOptimisation,
  SinglesResult,
  SinglesState,
  SpinOrbitalEnergies,
  StateCurve,
  StudyResults,
  Vibration,
  VibrationalState,
  WellConstants,
  WellDepth,
} from './calculation/result';
export type {
  CompleteStudy,
  FindingsOptions,
  LengthUnit,
  ScanCoordinate,
  Study,
  StudyAtom,
  StudyMolecule,
  StudyScan,
} from './calculation/study';
export { studiesInBases, studyInBasis } from './calculation/study-in-basis';
export {
  countWork,
  NOMINAL_SPEEDS,
  type PointWork,
  type Speeds,
  type Work,
  type WorkKind,
} from './calculation/work';
export type { CorrelationParts } from './configuration-interaction/correlation-parts';
export type { OrbitalPart, PairPart, ProjectedEnergy } from './configuration-interaction/projected-energy';
export type { RankPart } from './configuration-interaction/rank-parts';
export type { SpinName } from './configuration-interaction/spin';
export type { UnpairedElectrons } from './configuration-interaction/unpaired-electrons';
export {
  BOHR_IN_ANGSTROM,
  DALTON_IN_ELECTRON_MASSES,
  DIPOLE_IN_DEBYE,
  HARTREE_IN_EV,
  HARTREE_IN_KJ_PER_MOL,
  HARTREE_IN_WAVENUMBERS,
} from './constants';
export type { MeasuredConstant, MeasuredQuantity, MeasuredState } from './curves/measured-constants';
export {
  EngineError,
  type EngineErrorCode,
  type EngineErrorDetails,
  type SerializedEngineError,
} from './errors';
export { acceptHelpers, allowHelpers, helpThread } from './kernels/thread-team';
export type { WasmMemory as SharedKernelMemory } from './kernels/web-assembly';
export type { Vector3 } from './molecule/molecule';
export type { Stage, StageListener } from './stages';
export type { PointGroupName } from './symmetry/point-groups';
export type { StateSymmetry, TermSymbol } from './symmetry/state-symmetry';
export { type RunControl, type Termination, UNATTENDED } from './termination';

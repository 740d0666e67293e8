/** Doors of the commands: pure edits of a plan, a file for each part of the document. */
export { applyCommand, called, together, type Command, type Entered } from './command';
export { parsePlace, typedAt } from './typed';
export { indexOfId } from './edit';
export { setNotes, setTitle } from './document';
export {
  addLayer,
  duplicateLayer,
  moveLayer,
  nextLayer,
  removeLayer,
  renameFace,
  renameLayer,
  setContact,
  setContactKind,
  setGapNumber,
  setLayerMaterial,
  setThickness,
} from './layers';
export {
  addMaterial,
  blankMaterial,
  duplicateMaterial,
  isMaterialUsed,
  removeMaterial,
  renameMaterial,
  setLatent,
  setLatentNumber,
  setMaterialCurve,
  setMaterialProperty,
  setMaterialSource,
  setReaction,
  setReactionNumber,
  type MaterialProperty,
} from './materials';
export {
  makeStartPerLayer,
  makeStartProfile,
  makeStartSteady,
  makeStartUniform,
  setStartProfile,
  setStartTemperature,
  startTemperature,
  startTemperaturePath,
} from './initial';
export { faceKind, PART_KINDS, setInnerRadius, setPartKind } from './part';
export { setSource, setSourceNumber, sourceOf } from './sources';
export {
  addProbe,
  depthOf,
  duplicateProbe,
  moveProbe,
  nextProbe,
  removeProbe,
  renameProbe,
  setProbeNumber,
  setProbePlace,
} from './probes';
export {
  addStage,
  duplicateStage,
  moveStage,
  nextStage,
  removeStage,
  renameSetPoint,
  renameStage,
  setSetPointStart,
  setStageEnd,
  setStageLength,
} from './stages';
export {
  addSegment,
  kindOfSegment,
  moveSegment,
  rampAt,
  removeSegment,
  schedulePath,
  setRampStart,
  setSegment,
  setSegmentNumber,
  type ScheduleKey,
  type ScheduleOf,
  type SegmentKind,
  type SegmentNumber,
} from './segments';
export {
  copyExposuresFromBefore,
  EXPOSURE_NAMES,
  GREY,
  setCorrelationNumber,
  setEmissivity,
  setExposureKind,
  setRadiation,
  setSchedule,
  setScheduleNumber,
} from './exposures';
export {
  addRequirement,
  duplicateRequirement,
  moveRequirement,
  removeRequirement,
  renameRequirement,
  setCounts,
  setHoldTime,
  setLimit,
  setRuleKind,
  setSubject,
  setWithinTime,
  startRequirement,
  type RequirementStart,
} from './requirements';
export { moveEdge, placeNear, pullSegment, pullSetPoint, type Pull } from './dragging';
export { SCHEME_NAMES, setAccuracy, setDampedSteps, setGrid, setLayerCount, setScheme, setStep } from './settings';

/** Doors of linear: algebra on typed arrays, a leaf that knows no physics and imports nothing of ours. */
export { BandMatrix } from './bandMatrix';
export { eigenvaluesBelow, eigenvectorAt, largestEigenvalue, type SymmetricTridiagonal } from './symmetricEigen';

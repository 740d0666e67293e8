/**
 * A half space at one temperature whose face meets something from t = 0 on. H. S. Carslaw and J. C. Jaeger, Conduction of Heat in
 * Solids, 2nd ed., chapter II (sections 2.4, 2.7 and 2.9; numbers from memory):
 *
 *   held face            θ = erfc ξ                                             θ in parts of the face's step
 *   flux q               θ = 2 q √(α t)/k ierfc ξ,  ierfc ξ = exp(−ξ²)/√π − ξ erfc ξ
 *   film h               θ = erfc ξ − exp(η² + 2 ξ η) erfc(ξ + η)               θ in parts of Ta − Ti
 *
 * ξ = x/(2 √(α t)), η = h √(α t)/k.
 */
import erfc from '@stdlib/math-base-special-erfc';

/** Conductivity W/(m·K), and diffusivity α m²/s. */
export interface Solid {
  conductivity: number;
  diffusivity: number;
}

const reduced = (depth: number, time: number, { diffusivity }: Solid): number => depth / (2 * Math.sqrt(diffusivity * time));

/** Part of the face's step that has arrived. */
export const heldFaceTheta = (depth: number, time: number, solid: Solid): number => erfc(reduced(depth, time, solid));

/** Flux into a held face, W/m², for a step of 1 K. */
export const heldFaceFlux = (time: number, { conductivity, diffusivity }: Solid): number =>
  conductivity / Math.sqrt(Math.PI * diffusivity * time);

/** Rise under a flux of 1 W/m², K; 0 before it begins. */
export function fluxRise(depth: number, time: number, solid: Solid): number {
  if (time <= 0) return 0;
  const xi = reduced(depth, time, solid);
  const ierfc = Math.exp(-xi * xi) / Math.sqrt(Math.PI) - xi * erfc(xi);
  return (2 * Math.sqrt(solid.diffusivity * time) * ierfc) / solid.conductivity;
}

/** Part of the step of the fluid that has arrived. Not for η above 25: the exponential overflows. */
export function filmTheta(depth: number, time: number, film: number, solid: Solid): number {
  const xi = reduced(depth, time, solid);
  const eta = (film * Math.sqrt(solid.diffusivity * time)) / solid.conductivity;
  return erfc(xi) - Math.exp(eta * eta + 2 * xi * eta) * erfc(xi + eta);
}

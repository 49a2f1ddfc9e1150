import type { OccluderInput } from '#app/physics/model/input.ts';
import { add, fromAzimuthElevation, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import type { Scene, SceneOpening, SceneWall } from './scene.ts';

/** Four corners of the opening's outline, [east, north, up] in metres from the optic, from the lower left as one looks out. */
export function openingCorners(opening: SceneOpening): readonly [Vector, Vector, Vector, Vector] | null {
  const { azimuthDeg, distanceMm, offsetMm, widthMm, heightMm, sillMm } = opening;
  if (!distanceMm || !offsetMm || !widthMm || !heightMm || !sillMm) return null;
  const out = scale(fromAzimuthElevation(azimuthDeg.value, 0), distanceMm.value / 1000);
  const right = fromAzimuthElevation(azimuthDeg.value + 90, 0);
  const corner = (acrossMm: number, upMm: number): Vector => add(add(out, scale(right, acrossMm / 1000)), [0, 0, upMm / 1000]);
  const [left, far, low, high] = [offsetMm.value - widthMm.value / 2, offsetMm.value + widthMm.value / 2, sillMm.value, sillMm.value + heightMm.value];
  return [corner(left, low), corner(far, low), corner(far, high), corner(left, high)];
}

export const wallEnds = (wall: SceneWall): readonly [Vector, Vector] => [scale(fromAzimuthElevation(wall.fromDeg, 0), wall.fromM), scale(fromAzimuthElevation(wall.toDeg, 0), wall.toM)];

/** Walls are taken to stand on ground this far below the optic; only what rises above it can hide the sun. [m] */
const wallFootM = -60;
const inWords = ([eastM, northM, upM]: Vector) => ({ eastM, northM, upM });

/** The measured opening and walls as the engine takes them: outlines near the optic that rays must pass or miss. */
export function sceneOccluders(scene: Pick<Scene, 'opening' | 'walls'>): OccluderInput[] {
  const corners = scene.opening ? openingCorners(scene.opening) : null;
  const reveal = scene.opening?.revealMm?.value ?? 0;
  const opening: OccluderInput[] = corners ? [{ kind: 'opening', name: 'measured opening', corners: corners.map(inWords), ...(reveal > 0 ? { revealDepthM: reveal / 1000 } : {}) }] : [];
  const walls = (scene.walls ?? []).map((wall, index): OccluderInput => {
    const [from, to] = wallEnds(wall);
    const at = ([east, north]: Vector, up: number) => inWords([east, north, up]);
    return { kind: 'block', name: wall.name ?? `wall ${index + 1}`, corners: [at(from, wallFootM), at(to, wallFootM), at(to, wall.topM), at(from, wall.topM)] };
  });
  return [...opening, ...walls.filter((wall) => wall.corners.some((corner) => corner.upM > 0))];
}

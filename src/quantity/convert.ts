import { STANDARD_GRAVITY, TAU } from "./constants.ts";

export const radFromDeg = (deg: number): number => (deg * Math.PI) / 180;
export const degFromRad = (rad: number): number => (rad * 180) / Math.PI;
/** rad/s from revolutions a minute: 2π/60, never π/60. */
export const radpsFromRpm = (rpm: number): number => (rpm * TAU) / 60;
export const rpmFromRadps = (radps: number): number => (radps * 60) / TAU;
export const gFromMps2 = (mps2: number): number => mps2 / STANDARD_GRAVITY;
export const kelvinFromCelsius = (celsius: number): number => celsius + 273.15;

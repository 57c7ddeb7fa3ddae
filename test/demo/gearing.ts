/** Tooth counts of the gears on the bench: change a gear here and every mechanism that uses it is checked again. */

/** The steel pinion, on the tray hoist, the watering arm and the soil press. */
export const PINION = 16;

export const TRAY_DRIVEN = 54;
export const WATERING_DRIVEN = 48;

export const SHELF = { driver: 20, driven: 22 } as const;

export const DRUM = { driver: 22, driven: 36 } as const;

/** The lid's drive is a closed gearbox: only its ratio is known. */
export const LID_RATIO = 4;

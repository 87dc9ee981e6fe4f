/** Soil on the phone: texture, water held, and the class by feel. */
export * from './texture.js';
export * from './soil_water.js';
export * from './soil_by_feel.js';

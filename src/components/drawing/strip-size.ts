/** Height of one wire's row in the strip below the profile, px; the names beside it keep the same height. */
export const spanWireRowHeight = 32;

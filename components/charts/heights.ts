/** Heights of the drawings in px; skeletons take the same, so that nothing jumps. */
export const fadeHeight = 380;
export const logPanelHeight = 180;
export const historyHeight = 300;
export const bandLineHeight = 300;
export const binHeight = 300;
export const growthHeight = 340;
export const survivalHeight = 260;

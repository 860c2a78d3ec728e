export const phone = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };
export const desktop = { viewport: { width: 1280, height: 800 } };

/** How long the link to a new address is good for. */
export const addressChangeHours = 24;

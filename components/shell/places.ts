import type { Href } from 'expo-router';
import type { IconName } from '../ui';

/** A place of the product that the bar and the rail lead to. */
export interface Place {
  href: Href & string;
  label: string;
  icon: IconName;
  /** Beginnings of addresses that belong to it beside its own: `/cells` to Lifetimes. */
  under?: readonly string[];
  /** Its pages need the width: the rail beside them is narrow. */
  isWorkbench?: boolean;
}

const isWithin = (pathname: string, stem: string) => pathname === stem || pathname.startsWith(`${stem}/`);

const belongs = (place: Place, pathname: string) =>
  (place.href !== '/' && isWithin(pathname, place.href)) ||
  pathname === place.href ||
  (place.under ?? []).some((stem) => isWithin(pathname, stem));

/** The place an address belongs to; the one with the longest address where several do. */
export function placeOf(places: readonly Place[], pathname: string): Place | undefined {
  return places
    .filter((place) => belongs(place, pathname))
    .sort((one, other) => other.href.length - one.href.length)[0];
}

#!/bin/sh
# Makes public/fonts from the font packages: only the weights, characters and features the interface uses, as woff2.
# Needs pyftsubset with woff2 support (Debian: fonttools python3-brotli). Run from the root after changing the list.
set -eu
packages=node_modules/@expo-google-fonts
characters='U+0020-007E,U+00A0-00FF,U+0100-017F,U+0394,U+0398,U+03A3,U+03B1-03B5,U+03B8,U+03BA-03BC,U+03C1,U+03C3,U+03C4,U+2002,U+2007,U+2009,U+200A,U+2010-2015,U+2018-201E,U+2020,U+2022,U+2026,U+202F,U+2032,U+2033,U+2039,U+203A,U+2070,U+2074-2079,U+2080-2089,U+20AC,U+2190-2193,U+2212,U+221A,U+221E,U+2248,U+2260,U+2264,U+2265'
subset() {
  pyftsubset "$packages/$1" --unicodes="$characters" --layout-features='kern,mark,mkmk,ccmp,locl,liga,tnum,lnum,frac,sups,subs' \
    --no-hinting --flavor=woff2 --output-file="public/fonts/$2.woff2"
}
mkdir -p public/fonts
subset schibsted-grotesk/400Regular/SchibstedGrotesk_400Regular.ttf grotesk-400
subset schibsted-grotesk/600SemiBold/SchibstedGrotesk_600SemiBold.ttf grotesk-600
subset schibsted-grotesk/700Bold/SchibstedGrotesk_700Bold.ttf grotesk-700
subset spline-sans-mono/400Regular/SplineSansMono_400Regular.ttf mono-400
subset spline-sans-mono/500Medium/SplineSansMono_500Medium.ttf mono-500
cat "$packages/schibsted-grotesk/LICENSE_FONT" > public/fonts/LICENSE.txt
printf '\n\n' >> public/fonts/LICENSE.txt
cat "$packages/spline-sans-mono/LICENSE_FONT" >> public/fonts/LICENSE.txt

import localFont from 'next/font/local';

// The loader reads these calls without running them, so every value stands in them as it is. The ranges keep a file
// from being fetched before one of its characters is on the page; the music font brings the accidentals.

const besley = localFont({
  src: [
    { path: '../node_modules/@fontsource/besley/files/besley-latin-600-normal.woff2', weight: '600' },
    { path: '../node_modules/@fontsource/besley/files/besley-latin-700-normal.woff2', weight: '700' },
  ],
  variable: '--font-besley', display: 'swap', declarations: [{ prop: 'unicode-range', value: 'U+0000-00FF, U+0131, U+0152-0153, U+02BB-02BC, U+02C6, U+02DA, U+02DC, U+0304, U+0308, U+0329, U+2000-206F, U+20AC, U+2122, U+2191, U+2193, U+2212, U+2215, U+FEFF, U+FFFD' }],
});
const besleyExt = localFont({
  src: [
    { path: '../node_modules/@fontsource/besley/files/besley-latin-ext-600-normal.woff2', weight: '600' },
    { path: '../node_modules/@fontsource/besley/files/besley-latin-ext-700-normal.woff2', weight: '700' },
  ],
  variable: '--font-besley-ext', display: 'swap', preload: false, declarations: [{ prop: 'unicode-range', value: 'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+0304, U+0308, U+0329, U+1D00-1DBF, U+1E00-1E9F, U+1EF2-1EFF, U+2020, U+20A0-20AB, U+20AD-20C0, U+2113, U+2C60-2C7F, U+A720-A7FF' }],
});
const hanken = localFont({
  src: '../node_modules/@fontsource-variable/hanken-grotesk/files/hanken-grotesk-latin-wght-normal.woff2',
  weight: '100 900', variable: '--font-hanken', display: 'swap', declarations: [{ prop: 'unicode-range', value: 'U+0000-00FF, U+0131, U+0152-0153, U+02BB-02BC, U+02C6, U+02DA, U+02DC, U+0304, U+0308, U+0329, U+2000-206F, U+20AC, U+2122, U+2191, U+2193, U+2212, U+2215, U+FEFF, U+FFFD' }],
});
const hankenExt = localFont({
  src: '../node_modules/@fontsource-variable/hanken-grotesk/files/hanken-grotesk-latin-ext-wght-normal.woff2',
  weight: '100 900', variable: '--font-hanken-ext', display: 'swap', preload: false, declarations: [{ prop: 'unicode-range', value: 'U+0100-02BA, U+02BD-02C5, U+02C7-02CC, U+02CE-02D7, U+02DD-02FF, U+0304, U+0308, U+0329, U+1D00-1DBF, U+1E00-1E9F, U+1EF2-1EFF, U+2020, U+20A0-20AB, U+20AD-20C0, U+2113, U+2C60-2C7F, U+A720-A7FF' }],
});
const music = localFont({
  src: '../node_modules/@fontsource/noto-music/files/noto-music-music-400-normal.woff2',
  weight: '400', variable: '--font-music', display: 'swap', preload: false, declarations: [{ prop: 'unicode-range', value: 'U+266D-266F, U+1D100-1D1FF' }],
});

export const fontVariables = [besley, besleyExt, hanken, hankenExt, music].map(({ variable }) => variable).join(' ');

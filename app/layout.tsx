/** The frame of every page: skip link, the name and the places, the page, and what this server is. */
import type { Metadata, Viewport } from "next";
import localFont from "next/font/local";
import type { ReactNode } from "react";
import "katex/dist/katex.min.css";
import "./globals.css";
import { PageFoot } from "./_ui/PageFoot";
import { PageHead } from "./_ui/PageHead";

// A face that is not there when the page is first painted waits for the next page, so that no line moves.
const text = localFont({
  src: [
    {
      path: "../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-latin-wght-normal.woff2",
      style: "normal",
      weight: "200 900",
    },
    {
      path: "../node_modules/@fontsource-variable/source-serif-4/files/source-serif-4-latin-wght-italic.woff2",
      style: "italic",
      weight: "200 900",
    },
  ],
  variable: "--face-text",
  adjustFontFallback: "Times New Roman",
  display: "optional",
});

const code = localFont({
  src: [
    { path: "../node_modules/@fontsource/ibm-plex-mono/files/ibm-plex-mono-latin-400-normal.woff2", weight: "400" },
    { path: "../node_modules/@fontsource/ibm-plex-mono/files/ibm-plex-mono-latin-600-normal.woff2", weight: "600" },
  ],
  variable: "--face-code",
  adjustFontFallback: false,
  display: "optional",
});

/** Every page is made for its request: it shows what the library holds now, under a policy with a nonce of its own. */
export const dynamic = "force-dynamic";

export const metadata: Metadata = {
  title: { default: "Equiform", template: "%s · Equiform" },
  description: "A shared, checked, citable library of scattering-amplitude forms.",
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#fdfdfb" },
    { media: "(prefers-color-scheme: dark)", color: "#15181b" },
  ],
};

export default function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en" className={`${text.variable} ${code.variable}`}>
      <body>
        <a className="visually-hidden" href="#page">
          Skip to the page
        </a>
        <PageHead />
        <main id="page" tabIndex={-1}>
          {children}
        </main>
        <PageFoot />
      </body>
    </html>
  );
}

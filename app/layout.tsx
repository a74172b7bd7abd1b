import "@fontsource-variable/archivo/wdth.css";
import "@fontsource-variable/sometype-mono/wght.css";
import "./globals.css";
import type { Metadata, Viewport } from "next";
import { headers } from "next/headers";
import type { ReactNode } from "react";
import { Providers } from "@/components/shell/providers";
import { COLOURS } from "@/components/ui/colours";

export const metadata: Metadata = {
  title: { default: "Keepstep", template: "%s · Keepstep" },
  description: "Checks, changes and proves the motion settings of stepper-driven machines.",
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  viewportFit: "cover",
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: COLOURS.paper.light },
    { media: "(prefers-color-scheme: dark)", color: COLOURS.paper.dark },
  ],
};

/** Reading the nonce makes every page dynamic, which a nonce of its own for each answer demands. */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const nonce = (await headers()).get("x-nonce") ?? undefined;
  return (
    <html lang="en">
      <body>
        <Providers nonce={nonce}>{children}</Providers>
      </body>
    </html>
  );
}

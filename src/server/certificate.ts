/** Finds or makes a certificate that the spreadsheet program trusts for this machine. */

export interface Certificate {
  readonly key: Buffer | string;
  readonly cert: Buffer | string;
}

/** What is used of office-addin-dev-certs. */
export interface CertificateTool {
  verifyCertificates(): boolean;
  getHttpsServerOptions(): Promise<Certificate>;
}

export type Found = { readonly certificate: Certificate } | { readonly why: string };

/**
 * @param tool office-addin-dev-certs
 * @param mayInstall whether somebody is there to allow a new certificate authority on this machine
 */
export async function findCertificate(tool: CertificateTool, mayInstall: boolean): Promise<Found> {
  try {
    if (!tool.verifyCertificates() && !mayInstall) {
      return { why: "no trusted certificate is installed, and nobody is at the terminal to allow one" };
    }
    const { key, cert } = await tool.getHttpsServerOptions();
    return { certificate: { key, cert } };
  } catch (fault) {
    const message = fault instanceof Error ? fault.message : String(fault);
    return { why: message.trim().split("\n")[0]! };
  }
}

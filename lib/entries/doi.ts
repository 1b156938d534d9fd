const DOI = /10\.\d{4,9}\/\S+/;

/** "https://doi.org/10.1000/xyz" or "doi:10.1000/xyz" as the bare DOI; null where there is none. */
export const doiOf = (text: string): string | null => DOI.exec(text.trim())?.[0]?.replace(/[.,;]+$/, '') ?? null;

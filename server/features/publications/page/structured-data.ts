import type { Publication } from '#shared/contracts/publications.ts';

/** The publication as a schema.org Dataset, for search engines and archives. @see https://schema.org/Dataset */
export function structuredData(publication: Publication): object {
  const { address, headline, description, publisher, publishedAt, withdrawn, file, report } = publication;
  const times = report.sessions.flatMap(({ startedAt, endedAt }) => [startedAt, endedAt].filter((at) => at !== null));
  const organisation = { '@type': 'Organization', name: publisher };
  return {
    '@context': 'https://schema.org',
    '@type': 'Dataset',
    '@id': address,
    url: address,
    name: headline,
    description,
    identifier: `sha256:${file.digest}`,
    datePublished: publishedAt,
    ...(withdrawn === null ? {} : { dateModified: withdrawn.at }),
    creativeWorkStatus: withdrawn === null ? 'Published' : 'Withdrawn',
    creator: organisation,
    publisher: organisation,
    measurementTechnique: `${report.method}, blind; ${report.rung.name}`,
    variableMeasured: 'Answers of listeners to trials whose truth was drawn at random',
    isAccessibleForFree: true,
    ...(times.length < 2 ? {} : { temporalCoverage: `${times.sort()[0]}/${times.at(-1)}` }),
    distribution: {
      '@type': 'DataDownload',
      contentUrl: new URL(file.path, address).href,
      encodingFormat: 'application/json',
      contentSize: `${file.bytes} B`,
      sha256: file.digest,
    },
  };
}

import type { Metadata } from 'next';
import { SpeciesList } from '@/components/catalogue/catalogue-lists';
import { CatalogueTabs } from '@/components/catalogue/catalogue-tabs';
import { PageHeader } from '@/components/ui/page-header';
import { pageViewer } from '@/lib/http/page';

export const metadata: Metadata = { title: 'Species and constants' };

export default async function SpeciesPage() {
  await pageViewer('catalogue:read');
  return (
    <>
      <PageHeader
        title="Species and their constants"
        lead="log K of formation from the masters at 25 °C and ionic strength 0, each with its source."
      />
      <CatalogueTabs here="/catalogue/species" />
      <SpeciesList />
    </>
  );
}

import { computed } from 'vue';
import { useRoute, useRouter } from 'vue-router';
import { gradeSchema, type Grade } from '#shared/contract/grades.ts';

export interface MapPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly zoom: number;
}

function numberIn(value: unknown): number | null {
  const number = typeof value === 'string' && value !== '' ? Number(value) : Number.NaN;
  return Number.isFinite(number) ? number : null;
}

/** Place named by an address, or null. */
export function placeFrom(query: Readonly<Record<string, unknown>>): MapPlace | null {
  const [latitudeDeg, longitudeDeg, zoom] = [numberIn(query['lat']), numberIn(query['lng']), numberIn(query['z'])];
  return latitudeDeg === null || longitudeDeg === null || zoom === null ? null : { latitudeDeg, longitudeDeg, zoom };
}

/** Grades named by an address; an empty list shows all. */
export function gradesFrom(value: unknown): Grade[] {
  if (typeof value !== 'string') return [];
  return value.split(',').flatMap((name) => {
    const grade = gradeSchema.safeParse(name);
    return grade.success ? [grade.data] : [];
  });
}

/** Place, filter and search of the map, kept in its address. */
export function useMapAddress() {
  const route = useRoute();
  const router = useRouter();
  const change = (next: Record<string, string | undefined>) =>
    void router.replace({ query: { ...route.query, ...next } });
  return {
    firstPlace: placeFrom(route.query),
    firstSectionId: typeof route.query['section'] === 'string' ? route.query['section'] : null,
    grades: computed(() => gradesFrom(route.query['grades'])),
    search: computed(() => (typeof route.query['search'] === 'string' ? route.query['search'] : '')),
    showPlace: (place: MapPlace) =>
      change({ lat: place.latitudeDeg.toFixed(5), lng: place.longitudeDeg.toFixed(5), z: String(place.zoom) }),
    setGrades: (grades: readonly Grade[]) => change({ grades: grades.length === 0 ? undefined : grades.join(',') }),
    setSection: (sectionId: string | undefined) => change({ section: sectionId }),
    setSearch: (search: string) => change({ search: search === '' ? undefined : search }),
  };
}

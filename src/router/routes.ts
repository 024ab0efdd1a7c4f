import type { RouteRecordRaw } from 'vue-router';
import type { Role } from '#shared/contract/roles.ts';

declare module 'vue-router' {
  interface RouteMeta {
    /** Roles that the page is for; left out, it is for everybody who is signed in. */
    readonly roles?: readonly Role[];
    readonly isPublic?: boolean;
    readonly title?: string;
  }
}

const riskReaders = ['engineer', 'manager', 'safety-officer', 'admin'] as const;

/** The pages; paths are part of the contract with users, who keep links to them. */
export const routes: RouteRecordRaw[] = [
  { path: '/', component: () => import('#src/views/map/MapView.vue'), meta: { title: 'Map' } },
  {
    path: '/sections/:sectionId',
    component: () => import('#src/views/section/SectionView.vue'),
    props: true,
    meta: { title: 'Section' },
  },
  {
    path: '/risk',
    component: () => import('#src/views/risk/RiskView.vue'),
    meta: { title: 'Risk table', roles: riskReaders },
  },
  {
    path: '/alerts',
    component: () => import('#src/views/alerts/AlertsView.vue'),
    meta: { title: 'Alerts', roles: riskReaders },
  },
  {
    path: '/assessments',
    component: () => import('#src/views/assessments/AssessmentsView.vue'),
    meta: { title: 'Assessments' },
  },
  {
    path: '/assessments/:assessmentId',
    component: () => import('#src/views/assessments/AssessmentView.vue'),
    props: true,
    meta: { title: 'Assessment' },
  },
  {
    path: '/field',
    component: () => import('#src/views/field/FieldView.vue'),
    meta: { title: 'Field log', roles: ['crew', 'engineer'] },
  },
  { path: '/catalogue', redirect: '/catalogue/conductors' },
  {
    path: '/catalogue/:kind',
    component: () => import('#src/views/catalogue/CatalogueView.vue'),
    props: true,
    meta: { title: 'Catalogue' },
  },
  {
    path: '/import',
    component: () => import('#src/views/import/ImportView.vue'),
    meta: { title: 'Import', roles: ['engineer'] },
  },
  { path: '/help', component: () => import('#src/views/help/HelpView.vue'), meta: { title: 'Help' } },
  {
    path: '/admin',
    component: () => import('#src/views/admin/AdminView.vue'),
    meta: { title: 'Admin', roles: ['admin'] },
  },
  {
    path: '/signed-out',
    component: () => import('#src/views/signed-out/SignedOutView.vue'),
    meta: { title: 'Signed out', isPublic: true },
  },
  {
    path: '/:rest(.*)*',
    component: () => import('#src/views/signed-out/NotFoundView.vue'),
    meta: { title: 'Not found' },
  },
];

export { CohortScreen as default } from '@/components/cohorts/CohortScreen';

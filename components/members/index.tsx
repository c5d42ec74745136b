import type { ComponentType } from 'react';

import type * as Pages from './pages';
import { pagesOnDemand } from './pagesOnDemand';

// What only people with an account need, forms above all, is one part of the program; visitors do not pay for it.
const members = pagesOnDemand(() => import('./pages'));
const { page } = members;

const Restored = page((pages) => pages.RestoredAnswers);

/** A page of one's own banks: opens without a network, on what the device keeps. */
const ownPage = <Props extends object>(pick: (pages: typeof Pages) => ComponentType<Props>) => {
  const Inner = page(pick);
  return function OwnPage(props: Props) {
    return (
      <Restored>
        <Inner {...props} />
      </Restored>
    );
  };
};

/** Shows nothing: keeps and sends in the background, while somebody is signed in. */
export const AccountKeeper = members.component((pages) => pages.AccountKeeper, {
  loading: null,
  failed: () => null,
});

/** Fetches the members' pages ahead, so that they open where there is no signal. */
export const prefetchMembers = members.prefetch;

export const ConfirmAddressPage = page((pages) => pages.ConfirmAddressPage);
export const RegisterPage = page((pages) => pages.RegisterPage);
export const RemindLaterPage = page((pages) => pages.RemindLaterPage);
export const RequestResetPage = page((pages) => pages.RequestResetPage);
export const ResetPasswordPage = page((pages) => pages.ResetPasswordPage);
export const SettingsPage = page((pages) => pages.SettingsPage);
export const SignInAgainPage = page((pages) => pages.SignInAgainPage);
export const SignInPage = page((pages) => pages.SignInPage);
export const UnsubscribePage = page((pages) => pages.UnsubscribePage);
export const VerifyPage = page((pages) => pages.VerifyPage);
export const BankListPage = ownPage((pages) => pages.BankListPage);
export const BankPage = ownPage((pages) => pages.BankPage);
export const SharedRecordPage = page((pages) => pages.SharedRecordPage);
export const EditBankPage = ownPage((pages) => pages.EditBankPage);
export const NewBankPage = ownPage((pages) => pages.NewBankPage);
export const EarlierChecksPage = page((pages) => pages.EarlierChecksPage);
export const CheckFormPage = ownPage((pages) => pages.CheckFormPage);
export const GuidedTestPage = ownPage((pages) => pages.GuidedTestPage);
export const CheckPage = page((pages) => pages.CheckPage);
export const SecondFactorPage = page((pages) => pages.SecondFactorPage);
export const AgreementPage = page((pages) => pages.AgreementPage);
export const BlindReviewPage = page((pages) => pages.BlindReviewPage);
export const CatalogueEntryPage = page((pages) => pages.CatalogueEntryPage);
export const CatalogueListPage = page((pages) => pages.CatalogueListPage);
export const HealthPage = page((pages) => pages.HealthPage);
export const PeoplePage = page((pages) => pages.PeoplePage);
export const TrailPage = page((pages) => pages.TrailPage);
export const ScreeningPage = page((pages) => pages.ScreeningPage);
export const ReleasesPage = page((pages) => pages.ReleasesPage);
export const SubmissionPage = page((pages) => pages.SubmissionPage);

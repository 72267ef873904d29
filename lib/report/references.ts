/**
 * The published methods a run rests on.
 *
 * @module
 */

/** Papers and books by the short form in which the methods cite them. */
export const REFERENCES = {
  "Anselin 1995":
    "Anselin, L. (1995). Local indicators of spatial association. Geographical Analysis 27, 93–115.",
  "Anselin 1996":
    "Anselin, L. (1996). The Moran scatterplot as an ESDA tool to assess local instability in spatial association. In: Fischer, M., Scholten, H. & Unwin, D. (eds), Spatial Analytical Perspectives on GIS. Taylor & Francis, London, 111–125.",
  "Assunção & Reis 1999":
    "Assunção, R. M. & Reis, E. A. (1999). A new proposal to adjust Moran's I for population density. Statistics in Medicine 18, 2147–2162.",
  "Benjamini & Hochberg 1995":
    "Benjamini, Y. & Hochberg, Y. (1995). Controlling the false discovery rate: a practical and powerful approach to multiple testing. Journal of the Royal Statistical Society B 57, 289–300.",
  "Benjamini & Yekutieli 2001":
    "Benjamini, Y. & Yekutieli, D. (2001). The control of the false discovery rate in multiple testing under dependency. Annals of Statistics 29, 1165–1188.",
  "Blom 1958":
    "Blom, G. (1958). Statistical Estimates and Transformed Beta-Variables. Wiley, New York.",
  "Caldas de Castro & Singer 2006":
    "Caldas de Castro, M. & Singer, B. H. (2006). Controlling the false discovery rate: a new application to account for multiple and dependent tests in local statistics of spatial association. Geographical Analysis 38, 180–208.",
  "Cliff & Ord 1981":
    "Cliff, A. D. & Ord, J. K. (1981). Spatial Processes: Models and Applications. Pion, London.",
  "Clopper & Pearson 1934":
    "Clopper, C. J. & Pearson, E. S. (1934). The use of confidence or fiducial limits illustrated in the case of the binomial. Biometrika 26, 404–413.",
  "Dunn 1961":
    "Dunn, O. J. (1961). Multiple comparisons among means. Journal of the American Statistical Association 56, 52–64.",
  "Freeman & Tukey 1950":
    "Freeman, M. F. & Tukey, J. W. (1950). Transformations related to the angular and the square root. Annals of Mathematical Statistics 21, 607–611.",
  "Holm 1979":
    "Holm, S. (1979). A simple sequentially rejective multiple test procedure. Scandinavian Journal of Statistics 6, 65–70.",
  "Marshall 1991":
    "Marshall, R. J. (1991). Mapping disease and mortality rates using empirical Bayes estimators. Applied Statistics 40, 283–294.",
  "Moran 1950":
    "Moran, P. A. P. (1950). Notes on continuous stochastic phenomena. Biometrika 37, 17–23.",
  "Phipson & Smyth 2010":
    "Phipson, B. & Smyth, G. K. (2010). Permutation p-values should never be zero: calculating exact p-values when permutations are randomly drawn. Statistical Applications in Genetics and Molecular Biology 9, article 39.",
  "Potthoff & Whittinghill 1966":
    "Potthoff, R. F. & Whittinghill, M. (1966). Testing for homogeneity: II. The Poisson distribution. Biometrika 53, 183–190.",
  "Simonsohn, Simmons & Nelson 2020":
    "Simonsohn, U., Simmons, J. P. & Nelson, L. D. (2020). Specification curve analysis. Nature Human Behaviour 4, 1208–1214.",
  "Spiegelhalter 2005":
    "Spiegelhalter, D. J. (2005). Funnel plots for comparing institutional performance. Statistics in Medicine 24, 1185–1202.",
  "Tiefelsdorf, Griffith & Boots 1999":
    "Tiefelsdorf, M., Griffith, D. A. & Boots, B. (1999). A variance-stabilizing coding scheme for spatial link matrices. Environment and Planning A 31, 165–180.",
  "Waller & Gotway 2004":
    "Waller, L. A. & Gotway, C. A. (2004). Applied Spatial Statistics for Public Health Data. Wiley, Hoboken.",
  "Westfall & Young 1993":
    "Westfall, P. H. & Young, S. S. (1993). Resampling-Based Multiple Testing. Wiley, New York.",
} as const;

/** Short form of a reference. */
export type Reference = keyof typeof REFERENCES;

/** The references that a text cites, in the order of the list. */
export function citedIn(text: string): Reference[] {
  return (Object.keys(REFERENCES) as Reference[]).filter((name) => text.includes(name));
}

// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/baseline.h"

#include <gtest/gtest.h>

using namespace evenstroke;

// F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300-304, as carried out by
// scipy.interpolate.PchipInterpolator 1.10.1 (Debian 12). Values printed with all digits; the tolerance is a few
// units in the last place of numbers near 300.
TEST(BaselineCurveAgainstScipy, AgreesWhereTheCurveRisesTurnsAndFallsBack)
{
    const BaselineCurve curve({25, 50, 60, 75, 85, 100}, {72.9, 109.4, 140.0, 150.0, 149.0, 151.5});
    EXPECT_NEAR(*curve.at(30), 76.04517405364277, 1e-12);
    EXPECT_NEAR(*curve.at(40), 89.81756895567815, 1e-12);
    EXPECT_NEAR(*curve.at(52.5), 116.57306041172615, 1e-12);
    EXPECT_NEAR(*curve.at(70), 148.67827708096831, 1e-12);
    EXPECT_NEAR(*curve.at(80), 149.5, 1e-12);
    EXPECT_NEAR(*curve.at(84), 149.028, 1e-12);
    EXPECT_NEAR(*curve.at(92), 149.55605925925926, 1e-12);
}

TEST(BaselineCurveAgainstScipy, AgreesOnThreePoints)
{
    const BaselineCurve curve({40, 70, 100}, {290, 300, 340});
    EXPECT_NEAR(*curve.at(45), 290.3703703703704, 1e-12);
    EXPECT_NEAR(*curve.at(60), 295.03703703703707, 1e-12);
    EXPECT_NEAR(*curve.at(85), 315.125, 1e-12);
    EXPECT_NEAR(*curve.at(99), 338.17366666666663, 1e-12);
}

TEST(BaselineCurveAgainstScipy, LimitsTheSlopeAtAnEndWhereTheShapeTurns)
{
    const BaselineCurve curve({0, 1, 2, 3}, {0, 10, -1, -1.5});
    EXPECT_NEAR(*curve.at(0.1), 1.9405, 1e-12);
    EXPECT_NEAR(*curve.at(0.5), 7.5625, 1e-12);
    EXPECT_NEAR(*curve.at(1.5), 4.619565217391305, 1e-12);
    EXPECT_NEAR(*curve.at(2.7), -1.4522608695652173, 1e-12);
}

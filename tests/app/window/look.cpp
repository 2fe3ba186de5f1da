#include <catch2/catch.hpp>

#include "app/window/look/look.h"
#include "app/window/look/words.h"

using namespace unstring;

TEST_CASE("look: text has 4.5:1 and signs 3:1 against the sheet by day and by night (WCAG 2.2)") {
    for (const Look& look : {day_look(), night_look()}) {
        CAPTURE(look.is_night);
        for (const QColor& text : {look.ink, look.ink2, look.ink3, look.trouble, look.hand}) {
            CHECK(contrast_of(text, look.sheet) >= 4.5);
            CHECK(contrast_of(text, look.block) >= 4.5);
        }
        CHECK(contrast_of(look.band_ink, look.band) >= 4.5);
        for (const QColor& sign : {look.rewire, look.solar, look.dead})
            CHECK(contrast_of(sign, look.street) >= 3.0);
        CHECK(contrast_of(look.year_edge, look.sheet) >= 3.0);
    }
}

TEST_CASE("look: the number on every year's tone has 4.5:1, for plans of 2 to 20 years") {
    for (const Look& look : {day_look(), night_look()})
        for (int years = 2; years <= 20; ++years)
            for (int place = 0; place < years; ++place) {
                const QColor tone = year_tone(look, place, years);
                CAPTURE(look.is_night, years, place, tone.name().toStdString());
                CHECK(contrast_of(ink_on(tone), tone) >= 4.5);
            }
}

TEST_CASE("words: numbers are grouped, never minus zero, and money says dollars") {
    CHECK(money_text(9840.4) == "$9,840");
    CHECK(money_text(-120) == "-$120");
    CHECK(money_text(-0.2) == "$0");
    CHECK(number_text(-0.01, 1) == "0.0");
    CHECK(thousands_text(241300) == "241");
    CHECK(thousands_text(830) == "0.8");
    CHECK(percent_text(0.974) == "97 %");
    CHECK(count_text(1, "lamp", "lamps") == "1 lamp");
    CHECK(count_text(1200, "lamp", "lamps") == "1,200 lamps");
}

TEST_CASE("words: the contrast of black on white is 21, of a colour on itself 1") {
    CHECK(contrast_of(Qt::black, Qt::white) == Approx(21.0));
    CHECK(contrast_of(QColor("#0072B2"), QColor("#0072B2")) == Approx(1.0));
}

// One application for the whole run; listing the cases needs none.
#include <QApplication>
#include <QLocale>

#include <memory>

#define CATCH_CONFIG_EXTERNAL_INTERFACES
#include <catch2/catch.hpp>

#include "app/window/look/look.h"

namespace {

class QtSession : public Catch::TestEventListenerBase {
public:
    using TestEventListenerBase::TestEventListenerBase;

    void testRunStarting(const Catch::TestRunInfo&) override {
        if (qEnvironmentVariableIsEmpty("QT_QPA_PLATFORM")) qputenv("QT_QPA_PLATFORM", "offscreen");
        static int argc = 1;
        static char name[] = "test_app_window";
        static char* argv[] = {name, nullptr};
        application_ = std::make_unique<QApplication>(argc, argv);
        QLocale::setDefault(QLocale(QLocale::English, QLocale::UnitedStates));
        QApplication::setFont(unstring::text_font(12.5));
    }
    void testRunEnded(const Catch::TestRunStats&) override { application_.reset(); }

private:
    std::unique_ptr<QApplication> application_;
};

} // namespace

CATCH_REGISTER_LISTENER(QtSession)

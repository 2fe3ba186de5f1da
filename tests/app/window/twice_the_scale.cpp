// The scenarios again in a process of their own whose screen is at 200 %: the scale is fixed when the
// application starts.
#include <catch2/catch.hpp>

#include <QCoreApplication>
#include <QGuiApplication>
#include <QProcess>
#include <QScreen>

TEST_CASE("window at 200 %: marks, drags, pans and orders hold as at 100 %") {
    QProcess run;
    QProcessEnvironment environment = QProcessEnvironment::systemEnvironment();
    environment.insert("QT_SCALE_FACTOR", "2");
    run.setProcessEnvironment(environment);
    run.setProcessChannelMode(QProcess::MergedChannels);
    run.start(QCoreApplication::applicationFilePath(),
              {"the screen has two pixels to the unit,rail:*,map:*,window: a*,window: L*,hand out:*"});
    REQUIRE(run.waitForFinished(240000));
    INFO(run.readAll().toStdString());
    CHECK(run.exitStatus() == QProcess::NormalExit);
    CHECK(run.exitCode() == 0);
}

// Hidden: it holds only in the process that the case above starts.
TEST_CASE("the screen has two pixels to the unit", "[.at 200 %]") {
    CHECK(QGuiApplication::primaryScreen()->devicePixelRatio() == 2.0);
}

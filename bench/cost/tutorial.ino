// A line follower as tutorials write it: weighted average and PID in floating point, analogRead() and analogWrite().
// Same vehicle, pins and period as the generated sketch that it is measured against: eight sensors at A0 to A7 10 mm apart, two
// direction pins and PWM for each motor, 2 ms.

const int SENSORS = 8;
const int PINS[SENSORS] = {A0, A1, A2, A3, A4, A5, A6, A7};
const int MIN_VALUE[SENSORS] = {123, 123, 123, 123, 123, 123, 123, 123};
const int MAX_VALUE[SENSORS] = {839, 839, 839, 839, 839, 839, 839, 839};
const float POSITION_MM[SENSORS] = {35, 25, 15, 5, -5, -15, -25, -35};

const int LEFT_PWM = 5, LEFT_IN1 = 7, LEFT_IN2 = 8;
const int RIGHT_PWM = 6, RIGHT_IN1 = 9, RIGHT_IN2 = 10;
const int BUTTON = 2;

const float KP = 4.0, KI = 0.5, KD = 0.2;
const float BASE = 140.0;
const float PERIOD_S = 0.002;

float lastError = 0;
float integral = 0;
unsigned long lastMicros = 0;

float readError() {
  float sum = 0;
  float weighted = 0;
  for (int i = 0; i < SENSORS; i++) {
    float value = (float)(analogRead(PINS[i]) - MIN_VALUE[i]) / (MAX_VALUE[i] - MIN_VALUE[i]);
    value = constrain(value, 0.0, 1.0);
    sum += value;
    weighted += value * POSITION_MM[i];
  }
  if (sum < 0.3) return lastError;
  return weighted / sum;
}

void setMotor(int pwmPin, int in1, int in2, float speed) {
  digitalWrite(in1, speed >= 0);
  digitalWrite(in2, speed < 0);
  analogWrite(pwmPin, (int)constrain(fabs(speed), 0, 255));
}

void setup() {
  pinMode(LEFT_PWM, OUTPUT);
  pinMode(LEFT_IN1, OUTPUT);
  pinMode(LEFT_IN2, OUTPUT);
  pinMode(RIGHT_PWM, OUTPUT);
  pinMode(RIGHT_IN1, OUTPUT);
  pinMode(RIGHT_IN2, OUTPUT);
  pinMode(BUTTON, INPUT_PULLUP);
  while (digitalRead(BUTTON) == HIGH) {
  }
  delay(500);
  lastMicros = micros();
}

void loop() {
  if (micros() - lastMicros < 2000) return;
  lastMicros += 2000;
  float error = readError();
  integral = constrain(integral + error * PERIOD_S, -50, 50);
  float derivative = (error - lastError) / PERIOD_S;
  lastError = error;
  float correction = KP * error + KI * integral + KD * derivative;
  setMotor(LEFT_PWM, LEFT_IN1, LEFT_IN2, BASE - correction);
  setMotor(RIGHT_PWM, RIGHT_IN1, RIGHT_IN2, BASE + correction);
}
